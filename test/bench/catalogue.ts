import { gzipSync } from 'node:zlib';
import Papa from 'papaparse';
import { loadCatalogue } from '../../shared-core/catalogue/loadCatalogue.ts';
import { select } from '../../shared-core/catalogue/select.ts';
import { createRandom } from '../../shared-core/numerics/random.ts';

const ROWS = 1_000_000;
const CHUNK_BYTES = 65_536;

/**
 * A million rows of six columns read into columns of numbers, beside PapaParse in chunks of its best size with
 * Number() on the same four columns and nothing else: no tests of the rows, no line numbers, no account.
 */
export async function bench(): Promise<{
  name: string;
  rows: { what: string; seconds: number; ratio: number }[];
}> {
  const plain = inventedCsv(false);
  const quoted = inventedCsv(true);
  const packed = new Uint8Array(gzipSync(plain, { level: 6 }));

  await load(plain.subarray(0, 5_000_000));
  byPapaParse(plain.subarray(0, plain.lastIndexOf(10, 5_000_000) + 1));

  const reference = await seconds(() => byPapaParse(plain));
  const row = (what: string, time: number) => ({ what, seconds: time, ratio: reference / time });
  const rows = [row('PapaParse and Number() alone, in chunks', reference)];
  rows.push(row('loadCatalogue', await seconds(() => load(plain))));
  rows.push(row('loadCatalogue, names quoted', await seconds(() => load(quoted))));
  rows.push(row('loadCatalogue, gzip', await seconds(() => load(packed))));

  const { catalogue } = await load(plain);
  const cuts = [{ column: 'mag', min: 18.5, max: 22 }];
  const inCap = (raDeg: number, decDeg: number) => raDeg > 90 && raDeg < 270 && Math.abs(decDeg) < 45;
  rows.push(row('select again in memory', await seconds(() => select(catalogue, inCap, cuts))));
  return {
    name: `A catalogue of ${ROWS} rows, ${Math.round(plain.length / 1e6)} MB (${Math.round(plain.length / 1e6 / rows[1]!.seconds)} MB/s)`,
    rows,
  };
}

async function seconds(work: () => unknown): Promise<number> {
  const before = performance.now();
  await work();
  return (performance.now() - before) / 1000;
}

function load(bytes: Uint8Array) {
  return loadCatalogue(inChunks(bytes), { extras: ['mag'] });
}

async function* inChunks(bytes: Uint8Array): AsyncGenerator<Uint8Array> {
  for (let at = 0; at < bytes.length; at += CHUNK_BYTES) yield bytes.subarray(at, at + CHUNK_BYTES);
}

function byPapaParse(bytes: Uint8Array): number {
  const columns = [1, 2, 3, 4].map(() => new Float64Array(ROWS + 1));
  const decoder = new TextDecoder();
  let next = 0;
  for (let at = 0; at < bytes.length; ) {
    const end = bytes.lastIndexOf(10, at + CHUNK_BYTES) + 1;
    const text = decoder.decode(bytes.subarray(at, end - 1));
    at = end;
    for (const cells of Papa.parse<string[]>(text, { delimiter: ',', newline: '\n' }).data) {
      for (let k = 0; k < 4; k++) columns[k]![next] = Number(cells[k + 1]);
      next++;
    }
  }
  return next;
}

function inventedCsv(quotesNames: boolean): Uint8Array {
  const random = createRandom(7);
  const quote = quotesNames ? '"' : '';
  const lines = ['name,ra,dec,z,mag,flag'];
  for (let i = 0; i < ROWS; i++) {
    const ra = (360 * random.uniform()).toFixed(8);
    const dec = (180 * random.uniform() - 90).toFixed(8);
    const z = (2 * random.uniform()).toFixed(6);
    const mag = (18 + 6 * random.uniform()).toFixed(3);
    lines.push(`${quote}G ${i}${quote},${ra},${dec},${z},${mag},${random.uniform().toFixed(12)}`);
  }
  return new TextEncoder().encode(`${lines.join('\n')}\n`);
}
