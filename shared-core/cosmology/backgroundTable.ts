import { Refusal } from '../base/refusal.ts';
import { log1p, square } from '../numerics/elementary/elementary.ts';
import {
  COEFFICIENTS,
  evaluateCell,
  evaluateCellSlope,
  fitAntiderivativeCell,
} from '../numerics/piecewisePolynomial.ts';
import type { BackgroundTable } from './cosmology.ts';
import type { ExpansionIntegrals } from './integrals.ts';
import { TABLE_MAX_REDSHIFT } from './redshiftRange.ts';

/*
 * The variable is s = 1 - (1+z)^(-1/2), written z / (r (r+1)) with r = sqrt(1+z) to keep small redshifts' digits.
 * Without dark energy and radiation the comoving distance is a straight line in it (Einstein-de Sitter: 2 s), so
 * few cells suffice. The first cell begins at 0 with the value 0: the relative error stays small as z falls.
 */
const toVariable = (z: number) => {
  const root = Math.sqrt(1 + z);
  return z / (root * (root + 1));
};
const toRedshift = (s: number) => (s * (2 - s)) / square(1 - s);

/** A little beyond the last redshift, so that it falls inside a cell. */
const END = toVariable(TABLE_MAX_REDSHIFT + 1);
const FIRST_CELLS = 64;
const MAX_CELLS = 1 << 17;
/** Each cell holds distance, then time. */
const STRIDE = 2 * COEFFICIENTS;
/** Relative error of the integrands, hence of the integrals: below z = 20 and above. */
const TOLERANCE_NEAR = 1e-11;
const TOLERANCE_FAR = 1e-8;
const NEAR_END = toVariable(21);

/**
 * Piecewise antiderivatives of the two integrands. Cells are doubled until the fits meet the tolerance between
 * their nodes in every cell.
 *
 * @throws Refusal when 131072 cells do not suffice
 */
export function createBackgroundTable(
  integrals: ExpansionIntegrals,
  hubbleMpc: number,
  hubbleGyr: number,
): BackgroundTable {
  // dz = 2 (1+z)^(3/2) ds, so du = 2 (1+z)^(1/2) ds = 2/(1-s) ds
  const comovingSlope = (s: number) =>
    (hubbleMpc * integrals.comovingIntegrand(-2 * log1p(-s)) * 2) / (1 - s);
  const timeSlope = (s: number) => (hubbleGyr * integrals.timeIntegrand(-2 * log1p(-s)) * 2) / (1 - s);

  let cells = FIRST_CELLS;
  let coefficients = fitCells(comovingSlope, timeSlope, cells);
  while (coefficients === null) {
    cells *= 2;
    if (cells > MAX_CELLS) {
      throw new Refusal(
        'The expansion of this universe changes too abruptly to tabulate; choose less extreme w0 and wa.',
        'use',
      );
    }
    coefficients = fitCells(comovingSlope, timeSlope, cells);
  }
  return readTable(coefficients, cells);
}

function fitCells(
  comovingSlope: (s: number) => number,
  timeSlope: (s: number) => number,
  cells: number,
): Float64Array | null {
  const coefficients = new Float64Array(cells * STRIDE);
  const width = END / cells;
  let comoving = 0;
  let time = 0;
  for (let i = 0; i < cells; i++) {
    const start = i * width;
    const at = i * STRIDE;
    comoving = fitAntiderivativeCell(comovingSlope, start, width, comoving, coefficients, at);
    time = fitAntiderivativeCell(timeSlope, start, width, time, coefficients, at + COEFFICIENTS);
    const tolerance = start < NEAR_END ? TOLERANCE_NEAR : TOLERANCE_FAR;
    // Points between the nodes, near the two ends and the middle
    for (const t of [0.03, 0.37, 0.63, 0.97]) {
      const s = start + t * width;
      const comovingError = evaluateCellSlope(coefficients, at, t) / width / comovingSlope(s) - 1;
      const timeError = evaluateCellSlope(coefficients, at + COEFFICIENTS, t) / width / timeSlope(s) - 1;
      if (!(Math.abs(comovingError) <= tolerance && Math.abs(timeError) <= tolerance)) return null;
    }
  }
  return coefficients;
}

function readTable(coefficients: Float64Array, cells: number): BackgroundTable {
  const perCell = cells / END;

  const read = (z: number, offset: number) => {
    if (!(z >= 0 && z <= TABLE_MAX_REDSHIFT)) {
      throw new Refusal(
        `Redshift ${z} is outside the table; give one from 0 to ${TABLE_MAX_REDSHIFT}.`,
        'use',
      );
    }
    const at = toVariable(z) * perCell;
    const cell = Math.floor(at);
    return evaluateCell(coefficients, cell * STRIDE + offset, at - cell);
  };

  const invert = (value: number, offset: number, what: string) => {
    const last = read(TABLE_MAX_REDSHIFT, offset);
    if (!(value >= 0 && value <= last)) {
      throw new Refusal(
        `${what} ${value} is outside the table; give one from 0 to ${last.toPrecision(8)}.`,
        'use',
      );
    }
    let low = 0;
    let high = cells;
    while (high - low > 1) {
      const middle = (low + high) >> 1;
      if (coefficients[middle * STRIDE + offset]! <= value) low = middle;
      else high = middle;
    }
    const at = low * STRIDE + offset;
    let t = 0;
    // Nearly a straight line within a cell: Newton needs three or four steps
    for (let i = 0; i < 8; i++) {
      const step = (value - evaluateCell(coefficients, at, t)) / evaluateCellSlope(coefficients, at, t);
      t += step;
      if (Math.abs(step) <= 1e-9 * t) break;
    }
    // The last value stands for the last redshift, not for a rounding beyond it.
    return Math.min(TABLE_MAX_REDSHIFT, toRedshift((low + t) / perCell));
  };

  return {
    comovingMpc: (z) => read(z, 0),
    lookbackGyr: (z) => read(z, COEFFICIENTS),
    redshiftAtComovingMpc: (comovingMpc) => invert(comovingMpc, 0, 'Comoving distance in Mpc'),
    redshiftAtLookbackGyr: (lookbackGyr) => invert(lookbackGyr, COEFFICIENTS, 'Lookback time in Gyr'),
    fill: (redshift, comovingMpc, lookbackGyr) => {
      if (
        comovingMpc.length !== redshift.length ||
        (lookbackGyr?.length ?? redshift.length) !== redshift.length
      ) {
        throw new Refusal(
          `Arrays of ${redshift.length} redshifts, ${comovingMpc.length} distances and ${lookbackGyr?.length ?? 'no'} times do not match; give arrays of one length.`,
          'use',
        );
      }
      for (let i = 0; i < redshift.length; i++) {
        const z = redshift[i]!;
        if (!(z >= 0 && z <= TABLE_MAX_REDSHIFT)) {
          comovingMpc[i] = Number.NaN;
          if (lookbackGyr) lookbackGyr[i] = Number.NaN;
          continue;
        }
        const root = Math.sqrt(1 + z);
        const at = (z / (root * (root + 1))) * perCell;
        const cell = at | 0;
        const t = at - cell;
        const first = cell * STRIDE;
        comovingMpc[i] = evaluateCell(coefficients, first, t);
        if (lookbackGyr) lookbackGyr[i] = evaluateCell(coefficients, first + COEFFICIENTS, t);
      }
    },
  };
}
