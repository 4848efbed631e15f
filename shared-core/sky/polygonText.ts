import { Refusal } from '../base/refusal.ts';
import type { SkyShape } from './region.ts';

type Polygon = Extract<SkyShape, { kind: 'polygon' }>;

const HEADER = /^(ra|raj2000|ra_deg|radeg|alpha)$/i;

/**
 * Polygons from text: one vertex a line, RA and Dec in degrees with comma, semicolon, space or tab between; what
 * follows # is a comment; a blank line (comments do not count) begins the next polygon; the first vertex may be
 * repeated at the end; a first line that names the columns is passed over.
 * @throws Refusal (kind 'input') that names the line at fault
 */
export function parsePolygonText(text: string, side: 'smaller' | 'larger' = 'smaller'): Polygon[] {
  const polygons: Polygon[] = [];
  let vertices: [number, number][] = [];
  let seenData = false;
  const finish = (line: number): void => {
    const first = vertices[0];
    if (first === undefined) return;
    const last = vertices.at(-1)!;
    if (vertices.length > 1 && first[0] === last[0] && first[1] === last[1]) vertices.pop();
    if (vertices.length < 3) {
      throw new Refusal(
        `The polygon that ends in line ${line} has ${vertices.length} ${vertices.length === 1 ? 'vertex' : 'vertices'} but needs at least 3: add vertices, one a line.`,
      );
    }
    polygons.push({ kind: 'polygon', verticesDeg: vertices, side });
    vertices = [];
  };

  const lines = text.replace(/^\uFEFF/, '').split(/\r\n|\n|\r/);
  lines.forEach((raw, i) => {
    const line = raw.replace(/#.*/, '').trim();
    if (line === '') {
      if (raw.trim() === '') finish(i);
      return;
    }
    const cells = line.split(/[\s,;]+/).filter((cell) => cell !== '');
    if (!seenData && HEADER.test(cells[0] ?? '')) {
      seenData = true;
      return;
    }
    seenData = true;
    const [ra, dec] = cells.map(Number);
    if (cells.length !== 2 || !Number.isFinite(ra) || !Number.isFinite(dec)) {
      const shown = line.length > 40 ? `${line.slice(0, 40)}...` : line;
      throw new Refusal(
        `Line ${i + 1} of the polygon is '${shown}' but must be RA and Dec, two numbers in degrees: correct it.`,
      );
    }
    vertices.push([ra!, dec!]);
  });
  finish(lines.length);
  if (polygons.length === 0) {
    throw new Refusal('The polygon text holds no vertices: give RA and Dec in degrees, one vertex a line.');
  }
  return polygons;
}
