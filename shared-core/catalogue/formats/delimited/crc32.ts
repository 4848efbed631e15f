// Eight tables, so that eight bytes are taken a step ("slicing by eight"; Kounavis & Berry 2005).
const TABLES = makeTables();

function makeTables(): Int32Array[] {
  const first = new Int32Array(256);
  for (let byte = 0; byte < 256; byte++) {
    let remainder = byte;
    for (let bit = 0; bit < 8; bit++)
      remainder = remainder & 1 ? (remainder >>> 1) ^ 0xedb88320 : remainder >>> 1;
    first[byte] = remainder;
  }
  const tables = [first];
  for (let step = 1; step < 8; step++) {
    const before = tables[step - 1]!;
    tables.push(Int32Array.from(before, (entry) => first[entry & 255]! ^ (entry >>> 8)));
  }
  return tables;
}

/**
 * The CRC-32 of gzip (RFC 1952, section 8), carried on over pieces: crc32(b, crc32(a)) is that of a followed by b.
 * Unsigned 32-bit; 0 for no bytes.
 */
export function crc32(bytes: Uint8Array, before = 0): number {
  const [t0, t1, t2, t3, t4, t5, t6, t7] = TABLES as [
    Int32Array,
    Int32Array,
    Int32Array,
    Int32Array,
    Int32Array,
    Int32Array,
    Int32Array,
    Int32Array,
  ];
  let crc = ~before;
  let i = 0;
  for (const end = bytes.length - 7; i < end; i += 8) {
    crc ^= bytes[i]! | (bytes[i + 1]! << 8) | (bytes[i + 2]! << 16) | (bytes[i + 3]! << 24);
    crc =
      t7[crc & 255]! ^
      t6[(crc >>> 8) & 255]! ^
      t5[(crc >>> 16) & 255]! ^
      t4[crc >>> 24]! ^
      t3[bytes[i + 4]!]! ^
      t2[bytes[i + 5]!]! ^
      t1[bytes[i + 6]!]! ^
      t0[bytes[i + 7]!]!;
  }
  for (; i < bytes.length; i++) crc = t0[(crc ^ bytes[i]!) & 255]! ^ (crc >>> 8);
  return ~crc >>> 0;
}
