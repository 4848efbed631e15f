import { utf8Bytes } from '../../../shared-core/base/textCoding.ts';
import type { ByteSink } from './sink.ts';

/** Writes the objects of a PDF 1.7 file (ISO 32000-1) one after the other, and at the end the table of where they lie. */
export class PdfFile {
  private readonly sink: ByteSink;
  private readonly places: number[] = [];
  private at = 0;

  constructor(sink: ByteSink) {
    this.sink = sink;
  }

  async begin(): Promise<void> {
    // Four bytes above 127 tell transfer programs that the file is not text (7.5.2).
    await this.text('%PDF-1.7\n%');
    await this.bytes(Uint8Array.from([0xe2, 0xe3, 0xcf, 0xd3, 0x0a]));
  }

  /** A number for an object that is written later. */
  reserve(): number {
    this.places.push(0);
    return this.places.length;
  }

  async object(number: number, body: string): Promise<void> {
    this.places[number - 1] = this.at;
    await this.text(`${number} 0 obj\n${body}\nendobj\n`);
  }

  /** A stream whose length is known only afterwards; `write` puts its bytes. */
  async stream(
    number: number,
    dictionary: string,
    write: (put: (bytes: Uint8Array<ArrayBuffer>) => Promise<void>) => Promise<void>,
  ): Promise<void> {
    const length = this.reserve();
    this.places[number - 1] = this.at;
    await this.text(`${number} 0 obj\n<< ${dictionary} /Length ${length} 0 R >>\nstream\n`);
    const from = this.at;
    await write((bytes) => this.bytes(bytes));
    const written = this.at - from;
    await this.text('\nendstream\nendobj\n');
    await this.object(length, String(written));
  }

  /** @param trailer entries of the trailer's dictionary, /Root among them */
  async end(trailer: string): Promise<void> {
    const start = this.at;
    const rows = this.places.map((place) => `${String(place).padStart(10, '0')} 00000 n \n`).join('');
    const size = this.places.length + 1;
    await this.text(`xref\n0 ${size}\n0000000000 65535 f \n${rows}`);
    await this.text(`trailer\n<< /Size ${size} ${trailer} >>\nstartxref\n${start}\n%%EOF\n`);
  }

  private text(text: string): Promise<void> {
    return this.bytes(utf8Bytes(text) as Uint8Array<ArrayBuffer>);
  }

  private async bytes(bytes: Uint8Array<ArrayBuffer>): Promise<void> {
    this.at += bytes.length;
    await this.sink.write(bytes);
  }
}

/** Any text as a PDF string: UTF-16 with its mark, in hexadecimal (7.9.2.2). */
export function pdfString(text: string): string {
  let hex = 'feff';
  for (let i = 0; i < text.length; i++) hex += text.charCodeAt(i).toString(16).padStart(4, '0');
  return `<${hex}>`;
}

/** A number as PDF reads it: no exponent. */
export const pdfNumber = (value: number): string => String(Number(value.toFixed(4)));
