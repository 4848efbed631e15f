import { gunzipSync, gzipSync } from 'node:zlib';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { gunzip, isGzip } from '../../../shared-core/catalogue/formats/delimited/gunzip.ts';
import { inPieces, refusalOf, utf8 } from './support.ts';

async function unpack(bytes: Uint8Array, sizes?: readonly number[]): Promise<Uint8Array> {
  const pieces: Uint8Array[] = [];
  for await (const piece of gunzip(inPieces(bytes, sizes))) pieces.push(piece);
  return new Uint8Array(Buffer.concat(pieces));
}

const text = utf8(
  Array.from({ length: 20_000 }, (_, i) => `${i},${Math.sin(i)},${Math.cos(i * i)}`).join('\n'),
);
const packed = new Uint8Array(gzipSync(text));

/** A member with a file name, a comment, an extra field and a header checksum (RFC 1952, section 2.3). */
function withEveryHeaderField(data: Uint8Array): Uint8Array {
  const plain = gzipSync(data);
  const header = Buffer.from([0x1f, 0x8b, 8, 2 | 4 | 8 | 16, 0, 0, 0, 0, 0, 3, 4, 0, 65, 66, 0, 0]);
  return new Uint8Array(
    Buffer.concat([
      header,
      Buffer.from('field.csv\0'),
      Buffer.from('of the night\0'),
      Buffer.from([7, 7]),
      plain.subarray(10),
    ]),
  );
}

describe('gunzip', () => {
  it('knows gzip by its first two bytes', () => {
    expect(isGzip(packed)).toBe(true);
    expect(isGzip(utf8('ra,dec,z'))).toBe(false);
    expect(isGzip(new Uint8Array(0))).toBe(false);
  });

  it('unpacks what zlib packed, whatever the level', async () => {
    for (const level of [0, 1, 6, 9]) {
      expect(Buffer.compare(await unpack(new Uint8Array(gzipSync(text, { level }))), text)).toBe(0);
    }
  });

  it('reads members one after the other as one file, as zlib does', async () => {
    await fc.assert(
      fc.asyncProperty(
        fc.array(fc.uint8Array({ maxLength: 200 }), { minLength: 1, maxLength: 6 }),
        fc.array(fc.integer({ min: 1, max: 40 }), { minLength: 1, maxLength: 5 }),
        async (members, sizes) => {
          const file = Buffer.concat(members.map((member) => gzipSync(member)));
          expect(await unpack(new Uint8Array(file), sizes)).toEqual(new Uint8Array(gunzipSync(file)));
        },
      ),
      { numRuns: 60 },
    );
  });

  it('reads thousands of empty members', async () => {
    const empty = gzipSync(new Uint8Array(0));
    const file = Buffer.concat([...Array.from({ length: 5000 }, () => empty), gzipSync(utf8('the end'))]);
    expect(await unpack(new Uint8Array(file))).toEqual(utf8('the end'));
  });

  it('passes over every optional field of the header', async () => {
    const file = withEveryHeaderField(text.subarray(0, 1000));
    expect(await unpack(file)).toEqual(text.subarray(0, 1000));
    expect(await unpack(file, [1])).toEqual(text.subarray(0, 1000));
  });

  it('refuses a file cut short at any place', async () => {
    const small = new Uint8Array(gzipSync(text.subarray(0, 3000)));
    for (let end = 2; end < small.length; end += 7) {
      const refusal = await refusalOf(() => unpack(small.subarray(0, end)));
      expect(refusal.message).toMatch(/gzip file is cut short or damaged.*download it again/);
    }
    for (const missing of [1, 4, 8, 9]) {
      expect((await refusalOf(() => unpack(small.subarray(0, -missing)))).message).toMatch(/cut short/);
    }
  });

  it('refuses a second member cut short', async () => {
    const file = new Uint8Array(Buffer.concat([packed, gzipSync(text).subarray(0, 5000)]));
    expect((await refusalOf(() => unpack(file))).message).toMatch(/cut short/);
  });

  it('refuses one changed bit in data, checksum or length', async () => {
    for (const at of [2000, packed.length - 6, packed.length - 2]) {
      const changed = packed.slice();
      changed[at]! ^= 4;
      expect((await refusalOf(() => unpack(changed))).message).toMatch(/damaged/);
    }
    const members = new Uint8Array(Buffer.concat([packed, packed]));
    members[packed.length - 6]! ^= 4;
    expect((await refusalOf(() => unpack(members))).message).toMatch(/damaged/);
  });

  it('refuses bytes after the end that are no gzip', async () => {
    const file = new Uint8Array(Buffer.concat([packed, utf8('and something else that is long enough')]));
    expect((await refusalOf(() => unpack(file))).message).toMatch(/damaged/);
  });
});
