import { gzipSync } from 'node:zlib';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { crc32 } from '../../../shared-core/catalogue/formats/delimited/crc32.ts';
import { utf8 } from './support.ts';

describe('crc32', () => {
  it('gives the check value of the CRC-32 of ISO 3309 and zip', () => {
    // The published check value of this CRC over the digits 1 to 9. Value from memory.
    expect(crc32(utf8('123456789'))).toBe(0xcbf43926);
    expect(crc32(new Uint8Array(0))).toBe(0);
  });

  it('agrees with zlib and does not depend on how the bytes are cut', () => {
    fc.assert(
      fc.property(fc.uint8Array({ maxLength: 400 }), fc.nat(400), (bytes, cut) => {
        const packed = gzipSync(bytes);
        const sum = packed.readUInt32LE(packed.length - 8);
        expect(crc32(bytes)).toBe(sum);
        expect(crc32(bytes.subarray(cut), crc32(bytes.subarray(0, cut)))).toBe(sum);
      }),
    );
  });
});
