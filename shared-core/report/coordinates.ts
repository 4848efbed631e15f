import { csvCell } from '../base/cell.ts';
import type { KeptRow } from '../catalogue/loadCatalogue.ts';
import type { BackgroundTable, Cosmology } from '../cosmology/cosmology.ts';
import { cos, sin } from '../numerics/elementary/elementary.ts';

const DEG = Math.PI / 180;

/**
 * Writes rows with their comoving position. Axes: the observer at the origin, x to RA 0 Dec 0, y to RA 90 Dec 0,
 * z to Dec +90 (ICRS); lengths are the line-of-sight comoving distance along the direction, so separations are
 * those of a flat universe (in a curved one they hold for small separations only).
 */
export class CoordinateWriter {
  readonly #table: BackgroundTable;
  readonly #ageTodayGyr: number;
  readonly #factor: number;
  readonly #perH: boolean;

  constructor(cosmology: Cosmology, perH: boolean) {
    this.#table = cosmology.table();
    this.#ageTodayGyr = cosmology.ageGyr(0);
    this.#factor = perH ? cosmology.h : 1;
    this.#perH = perH;
  }

  header(withId: boolean): string {
    const length = this.#perH ? 'MpcPerH' : 'Mpc';
    const names = [
      'raDeg',
      'decDeg',
      'redshift',
      `comoving${length}`,
      `x${length}`,
      `y${length}`,
      `z${length}`,
    ];
    return `${['line', ...(withId ? ['id'] : []), ...names, 'lookbackGyr', 'ageGyr'].join(',')}\n`;
  }

  line({ line, id, raDeg, decDeg, redshift }: KeptRow): string {
    const d = this.#table.comovingMpc(redshift) * this.#factor;
    const lookbackGyr = this.#table.lookbackGyr(redshift);
    const across = d * cos(decDeg * DEG);
    const x = across * cos(raDeg * DEG);
    const y = across * sin(raDeg * DEG);
    const z = d * sin(decDeg * DEG);
    const name = id === null ? '' : `${csvCell(id)},`;
    return `${line},${name}${raDeg},${decDeg},${redshift},${d},${x},${y},${z},${lookbackGyr},${this.#ageTodayGyr - lookbackGyr}\n`;
  }
}
