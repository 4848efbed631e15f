import type { ByteSink } from '../../write/sink.ts';
import { box, letters, u32 } from './boxes.ts';
import { type EncodedFrame, type FilmFacts, type FilmFile, joined } from './filmFile.ts';
import { movieBox } from './mp4Movie.ts';

/**
 * An MP4 file with one H.264 track. Frames gather in media boxes of their own that begin with a key frame; the box that
 * tells where they lie comes last, so that nothing needs to be known before it is written.
 */
export class Mp4File implements FilmFile {
  private readonly sink: ByteSink;
  private readonly facts: FilmFacts;
  private readonly avcC: Uint8Array;
  private writtenBytes = 0;
  private readonly sizes: number[] = [];
  private readonly keys: number[] = [];
  private readonly chunks: { readonly offset: number; readonly frames: number }[] = [];
  private held: Uint8Array[] = [];

  private constructor(sink: ByteSink, facts: FilmFacts, avcC: Uint8Array) {
    this.sink = sink;
    this.facts = facts;
    this.avcC = avcC;
  }

  /** @param avcC the decoder's configuration (ISO/IEC 14496-15, section 5.3.3), as the encoder tells it */
  static async open(sink: ByteSink, facts: FilmFacts, avcC: Uint8Array): Promise<Mp4File> {
    const file = new Mp4File(sink, facts, avcC);
    await file.write(box('ftyp', letters('isom'), u32(0x200), letters('isomiso2avc1mp41')));
    return file;
  }

  async add({ bytes, key }: EncodedFrame): Promise<void> {
    if (key) await this.flush();
    this.sizes.push(bytes.length);
    if (key) this.keys.push(this.sizes.length);
    this.held.push(bytes);
  }

  async end(): Promise<void> {
    await this.flush();
    if (this.sizes.length !== this.facts.frames)
      throw new Error(`${this.sizes.length} of ${this.facts.frames} frames came from the encoder`);
    const { sizes, keys, chunks, facts, avcC } = this;
    await this.write(movieBox(facts, { sizes, keys, chunks, avcC }));
  }

  private async flush(): Promise<void> {
    if (this.held.length === 0) return;
    this.chunks.push({ offset: this.writtenBytes + 8, frames: this.held.length });
    const bytes = box('mdat', joined(this.held));
    this.held = [];
    await this.write(bytes);
  }

  private async write(bytes: Uint8Array<ArrayBuffer>): Promise<void> {
    this.writtenBytes += bytes.length;
    await this.sink.write(bytes);
  }
}
