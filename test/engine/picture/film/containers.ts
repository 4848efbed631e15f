/* Readers of the two containers, written from their standards and apart from the writers. */

/** An element of EBML (RFC 8794) or a box of ISO/IEC 14496-12. */
export interface Part {
  readonly id: string;
  /** Place of the content in the file. */
  readonly start: number;
  readonly content: Uint8Array;
  readonly parts: readonly Part[];
}

/** Matroska's masters (RFC 9559): segment, info, tracks, entry, video, colour, tags, tag, targets, simple tag, cluster. */
const MASTERS = new Set([
  '1a45dfa3',
  '18538067',
  '1549a966',
  '1654ae6b',
  'ae',
  'e0',
  '55b0',
  '1254c367',
  '7373',
  '63c0',
  '67c8',
  '1f43b675',
]);

export function readEbml(bytes: Uint8Array, from = 0, to = bytes.length): Part[] {
  const out: Part[] = [];
  for (let at = from; at < to; ) {
    const idLength = Math.clz32(bytes[at]!) - 23;
    const id = Buffer.from(bytes.subarray(at, at + idLength)).toString('hex');
    at += idLength;
    const sizeLength = Math.clz32(bytes[at]!) - 23;
    let size = bytes[at]! & (0xff >> sizeLength);
    let unknown = size === 0xff >> sizeLength;
    for (let i = 1; i < sizeLength; i++) {
      size = size * 256 + bytes[at + i]!;
      unknown &&= bytes[at + i] === 0xff;
    }
    at += sizeLength;
    const end = unknown ? to : at + size;
    if (end > to) throw new Error(`element ${id} reaches beyond what holds it`);
    out.push({
      id,
      start: at,
      content: bytes.subarray(at, end),
      parts: MASTERS.has(id) ? readEbml(bytes, at, end) : [],
    });
    at = end;
  }
  return out;
}

const BOXES = new Set(['moov', 'trak', 'mdia', 'minf', 'dinf', 'stbl', 'udta', 'ilst']);

export function readBoxes(bytes: Uint8Array, from = 0, to = bytes.length): Part[] {
  const view = new DataView(bytes.buffer, bytes.byteOffset);
  const out: Part[] = [];
  for (let at = from; at < to; ) {
    const end = at + view.getUint32(at);
    const id = Buffer.from(bytes.subarray(at + 4, at + 8)).toString('latin1');
    if (end > to || end < at + 8) throw new Error(`box ${id} reaches beyond what holds it`);
    // The metadata box has version and flags before its boxes; an item of its list holds one more box.
    const inner = id === 'meta' ? at + 12 : at + 8;
    const holds = BOXES.has(id) || id === 'meta' || id.startsWith('©') || id === 'desc' || id === 'cprt';
    out.push({
      id,
      start: at + 8,
      content: bytes.subarray(at + 8, end),
      parts: holds ? readBoxes(bytes, inner, end) : [],
    });
    at = end;
  }
  return out;
}

/** The parts at the end of a path, such as all frames of all clusters. */
export function at(parts: readonly Part[], ...path: readonly string[]): Part[] {
  const [first, ...rest] = path;
  const found = parts.filter(({ id }) => id === first);
  return rest.length === 0 ? found : found.flatMap((part) => at(part.parts, ...rest));
}

export const numberOf = (part: Part | undefined): number =>
  part!.content.reduce((sum, byte) => sum * 256 + byte, 0);
export const textOf = (part: Part | undefined): string => new TextDecoder().decode(part!.content);

/** Matroska's tags by name. */
export function tagsOf(parts: readonly Part[]): Record<string, string> {
  return Object.fromEntries(
    at(parts, '18538067', '1254c367', '7373', '67c8').map(({ parts: tag }) => [
      textOf(at(tag, '45a3')[0]),
      textOf(at(tag, '4487')[0]),
    ]),
  );
}
