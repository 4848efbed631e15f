import { expect, it } from 'vitest';
import { rowName } from '../../../shared-core/catalogue/rowName.ts';

const FILE =
  '# a comment\nname,ra,dec,z\n g1 ,10,1,0.1\n"g,2",11,2,0.2\n\ng3,bad,3,0.3\n"g\n4",13,4,0.4\nλ5,14,5,0.5\n';
const NAMES = new Map([
  [3, 'g1'],
  [4, 'g,2'],
  [6, 'g3'],
  [7, 'g\n4'],
  [9, 'λ5'],
]);
const MAPPING = { id: 'name' };

async function* pieces(text: string, size: number): AsyncIterable<Uint8Array> {
  const bytes = new TextEncoder().encode(text);
  for (let at = 0; at < bytes.length; at += size) yield bytes.subarray(at, at + size);
}

it.each([1, 7, 1000])('finds the name at each line, the file in pieces of %d bytes', async (size) => {
  for (const [line, name] of NAMES) expect(await rowName(pieces(FILE, size), MAPPING, line)).toBe(name);
});

it('has no name for a line without a row, and where no column has names', async () => {
  expect(await rowName(pieces(FILE, 9), MAPPING, 5)).toBeNull();
  expect(await rowName(pieces(FILE, 9), MAPPING, 99)).toBeNull();
  expect(await rowName(pieces('ra,dec,z\n1,2,0.3\n', 9), undefined, 2)).toBeNull();
});

it('reads no further than the row', async () => {
  async function* endless(): AsyncIterable<Uint8Array> {
    yield new TextEncoder().encode('name,ra,dec,z\n');
    for (let i = 0; i < 300_000; i++) yield new TextEncoder().encode(`g${i},10,1,0.1\n`);
    throw new Error('read on');
  }
  expect(await rowName(endless(), MAPPING, 5)).toBe('g3');
});
