import type { SetAsideRow } from '../../../shared-core/catalogue/catalogue.ts';
import { loadCatalogue } from '../../../shared-core/catalogue/loadCatalogue.ts';
import { createCosmology } from '../../../shared-core/cosmology/cosmology.ts';
import { findPublishedSet } from '../../../shared-core/cosmology/publishedSets.ts';
import { DEMO_MAPPING, DEMO_REGION, FIELDS } from '../../../shared-core/demo/scenario.ts';
import { compileRegion } from '../../../shared-core/sky/compileRegion.ts';

async function* bytesOf(chunks: Iterable<string | Uint8Array>): AsyncGenerator<Uint8Array> {
  for (const chunk of chunks) yield typeof chunk === 'string' ? new TextEncoder().encode(chunk) : chunk;
}

/** Reads a demo file as the program does, with the demo's columns and region. */
export async function readDemo(chunks: Iterable<string | Uint8Array>) {
  const footprint = compileRegion(DEMO_REGION);
  const setAside: SetAsideRow[] = [];
  const { catalogue } = await loadCatalogue(bytesOf(chunks), {
    mapping: DEMO_MAPPING,
    extras: ['colour'],
    contains: (raDeg, decDeg) => footprint.contains(raDeg, decDeg),
    onSetAside: (row) => setAside.push(row),
  });
  return { catalogue, setAside };
}

export type ReadDemo = Awaited<ReturnType<typeof readDemo>>['catalogue'];

/** Index of the field that a position lies in, by the fields' own shapes. */
export function fieldOf(raDeg: number, decDeg: number): number {
  return fieldFootprints.findIndex((footprint) => footprint.contains(raDeg, decDeg));
}

const fieldFootprints = FIELDS.map((field) => compileRegion({ parts: [field.shape], holes: [] }));

/** Comoving places of the galaxies of one field, Mpc: x along its middle line, y east, z north. */
export function placesIn(catalogue: ReadDemo, field: number, middle: { raDeg: number; decDeg: number }) {
  const table = createCosmology(findPublishedSet('planck2018').parameters).table();
  const x: number[] = [];
  const y: number[] = [];
  const z: number[] = [];
  const rad = Math.PI / 180;
  const [sin, cos] = [Math.sin(middle.decDeg * rad), Math.cos(middle.decDeg * rad)];
  for (let i = 0; i < catalogue.raDeg.length; i++) {
    const [raDeg, decDeg] = [catalogue.raDeg[i]!, catalogue.decDeg[i]!];
    if (fieldOf(raDeg, decDeg) !== field) continue;
    const r = table.comovingMpc(catalogue.redshift[i]!);
    const ra = (raDeg - middle.raDeg) * rad;
    const forward = Math.cos(decDeg * rad) * Math.cos(ra);
    const up = Math.sin(decDeg * rad);
    x.push(r * (cos * forward + sin * up));
    y.push(r * Math.cos(decDeg * rad) * Math.sin(ra));
    z.push(r * (cos * up - sin * forward));
  }
  return { x, y, z };
}

/** Counts in cubic cells of a box given by its low corner and its cells, C order. */
export function countsInCells(
  { x, y, z }: { x: number[]; y: number[]; z: number[] },
  low: readonly [number, number, number],
  cells: readonly [number, number, number],
  sizeMpc: number,
): Float64Array {
  const counts = new Float64Array(cells[0] * cells[1] * cells[2]);
  for (let i = 0; i < x.length; i++) {
    const a = Math.floor((x[i]! - low[0]) / sizeMpc);
    const b = Math.floor((y[i]! - low[1]) / sizeMpc);
    const c = Math.floor((z[i]! - low[2]) / sizeMpc);
    if (a < 0 || b < 0 || c < 0 || a >= cells[0] || b >= cells[1] || c >= cells[2]) continue;
    const at = (a * cells[1] + b) * cells[2] + c;
    counts[at] = counts[at]! + 1;
  }
  return counts;
}
