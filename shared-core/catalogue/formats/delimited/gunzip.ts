import { Gunzip } from 'fflate';
import { Refusal } from '../../../base/refusal.ts';
import { crc32 } from './crc32.ts';

// Deflate can unpack to 1032 times its size, so 32 kB in are never more than 34 MB out, whatever the file says.
const PUSH_BYTES = 32_768;
const TRAILER_BYTES = 8;

/** True of the first bytes of a gzip file (RFC 1952, section 2.3.1: ID1 = 31, ID2 = 139). */
export function isGzip(head: Uint8Array): boolean {
  return head[0] === 0x1f && head[1] === 0x8b;
}

/** One gzip member's sum and size so far, and the last bytes that went in. */
class MemberCheck {
  #crc = 0;
  #size = 0;
  #fed = 0;
  #tail = new Uint8Array(0);

  unpacked(data: Uint8Array): void {
    this.#crc = crc32(data, this.#crc);
    this.#size = (this.#size + data.length) >>> 0;
  }

  /** To be called with each piece of the packed file before it is unpacked. */
  fed(piece: Uint8Array): void {
    const joined = new Uint8Array(this.#tail.length + piece.length);
    joined.set(this.#tail);
    joined.set(piece, this.#tail.length);
    this.#tail = joined;
    this.#fed += piece.length;
  }

  /** Drops what no trailer can reach back to: a header (with its name and comment) may follow it. */
  trim(): void {
    this.#tail = this.#tail.slice(-(PUSH_BYTES + TRAILER_BYTES));
  }

  /** The member that ends at this offset of the file: do its sum and size hold (RFC 1952, CRC32 and ISIZE)? */
  endsAt(offset: number): boolean {
    const at = offset - TRAILER_BYTES - (this.#fed - this.#tail.length);
    if (at < 0) return false;
    const trailer = new DataView(this.#tail.buffer, this.#tail.byteOffset + at, TRAILER_BYTES);
    const holds = trailer.getUint32(0, true) === this.#crc && trailer.getUint32(4, true) === this.#size;
    this.#crc = 0;
    this.#size = 0;
    return holds;
  }

  endsHere(): boolean {
    return this.endsAt(this.#fed);
  }
}

function damaged(): Refusal {
  return new Refusal(
    'This gzip file is cut short or damaged (its contents do not match its own checksum): copy or download it again, or unpack what is left of it and open that.',
  );
}

/**
 * Unpacks gzip as a stream in bounded memory. Several members one after the other are one file (RFC 1952,
 * section 2.2); each member's checksum and length are held against its trailer.
 *
 * Throws Refusal where the file is cut short or damaged: everything before that has been given out by then.
 */
export async function* gunzip(blocks: AsyncIterable<Uint8Array>): AsyncGenerator<Uint8Array> {
  const check = new MemberCheck();
  let ready: Uint8Array[] = [];
  let holds = true;
  const unpacker = new Gunzip((data) => {
    if (data.length === 0) return;
    check.unpacked(data);
    ready.push(data);
  });
  unpacker.onmember = (offset) => {
    holds = check.endsAt(offset) && holds;
  };
  const push = (piece: Uint8Array, last: boolean) => {
    try {
      unpacker.push(piece, last);
    } catch {
      throw damaged();
    }
    if (!holds) throw damaged();
  };
  for await (const block of blocks) {
    for (let at = 0; at < block.length; at += PUSH_BYTES) {
      // A copy: the unpacker keeps what it has not used, and a block is only lent.
      const piece = block.slice(at, at + PUSH_BYTES);
      check.fed(piece);
      push(piece, false);
      check.trim();
      const given = ready;
      ready = [];
      yield* given;
    }
  }
  push(new Uint8Array(0), true);
  if (!check.endsHere()) throw damaged();
  yield* ready;
}
