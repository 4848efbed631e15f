import { powerOf } from '../numerics/elementary/elementary.ts';

/** The unit family of a number; the power of length in it decides how it changes between Mpc and Mpc/h. */
export type Unit =
  | 'none'
  | 'count'
  | 'Mpc'
  | 'Mpc3'
  | 'perMpc'
  | 'perMpc3'
  | 'Mpc3PerSr'
  | 'Gyr'
  | 'kmSMpc'
  | 'mag'
  | 'deg';

interface UnitWords {
  /** For people. */
  readonly plain: readonly [mpc: string, mpcPerH: string];
  /** As the astropy project's ECSV readers spell it (VOUnit-like). */
  readonly ecsv: readonly [mpc: string, mpcPerH: string];
  readonly latex: readonly [mpc: string, mpcPerH: string];
  /** Power of length: value in h-units = value x h^power. */
  readonly lengthPower: number;
}

const same = (text: string): [string, string] => [text, text];

export const UNITS: Readonly<Record<Unit, UnitWords>> = {
  none: { plain: same(''), ecsv: same(''), latex: same(''), lengthPower: 0 },
  count: { plain: same(''), ecsv: same(''), latex: same(''), lengthPower: 0 },
  Mpc: {
    plain: ['Mpc', 'Mpc/h'],
    ecsv: ['Mpc', 'Mpc / littleh'],
    latex: ['Mpc', '$h^{-1}$\\,Mpc'],
    lengthPower: 1,
  },
  Mpc3: {
    plain: ['Mpc^3', '(Mpc/h)^3'],
    ecsv: ['Mpc3', 'Mpc3 / littleh3'],
    latex: ['Mpc$^3$', '$h^{-3}$\\,Mpc$^3$'],
    lengthPower: 3,
  },
  Mpc3PerSr: {
    plain: ['Mpc^3/sr', '(Mpc/h)^3/sr'],
    ecsv: ['Mpc3 / sr', 'Mpc3 / (littleh3 sr)'],
    latex: ['Mpc$^3$\\,sr$^{-1}$', '$h^{-3}$\\,Mpc$^3$\\,sr$^{-1}$'],
    lengthPower: 3,
  },
  perMpc: {
    plain: ['1/Mpc', 'h/Mpc'],
    ecsv: ['1 / Mpc', 'littleh / Mpc'],
    latex: ['Mpc$^{-1}$', '$h$\\,Mpc$^{-1}$'],
    lengthPower: -1,
  },
  perMpc3: {
    plain: ['Mpc^-3', '(h/Mpc)^3'],
    ecsv: ['1 / Mpc3', 'littleh3 / Mpc3'],
    latex: ['Mpc$^{-3}$', '$h^3$\\,Mpc$^{-3}$'],
    lengthPower: -3,
  },
  Gyr: { plain: same('Gyr'), ecsv: same('Gyr'), latex: same('Gyr'), lengthPower: 0 },
  kmSMpc: {
    plain: same('km/s/Mpc'),
    ecsv: same('km / (Mpc s)'),
    latex: same('km\\,s$^{-1}$\\,Mpc$^{-1}$'),
    lengthPower: 0,
  },
  mag: { plain: same('mag'), ecsv: same('mag'), latex: same('mag'), lengthPower: 0 },
  deg: { plain: same('deg'), ecsv: same('deg'), latex: same('deg'), lengthPower: 0 },
};

/** One number of a result: how it is called, shown and explained, everywhere. */
export interface Quantity<Row> {
  /** Name in JSON, CSV and ECSV while lengths are in Mpc. */
  readonly key: string;
  /** The same while lengths are in Mpc/h; absent where nothing changes. */
  readonly keyPerH?: string;
  /** Short heading for tables on screen. */
  readonly title: string;
  readonly latexTitle: string;
  readonly unit: Unit;
  /** Begins a new block where a text table is too wide for one. */
  readonly startsBlock?: true;
  readonly value: (row: Row) => number | null;
  /** How a person is shown it: decimals, or significant digits. */
  readonly show: { readonly decimals: number } | { readonly significant: number };
  /** One line: what it is. */
  readonly meaning: string;
  readonly formula: string;
  /** Paper and equation, or "common practice, no source". */
  readonly source: string;
}

/** The units a reader chose. */
export interface ShownUnits {
  readonly perH: boolean;
  readonly h: number;
}

/** The number as the reader asked for it: Mpc^n, or (Mpc/h)^n by a factor h^n. */
export function shownValue<Row>(quantity: Quantity<Row>, row: Row, units: ShownUnits): number | null {
  const value = quantity.value(row);
  const { lengthPower } = UNITS[quantity.unit];
  if (value === null || !units.perH || lengthPower === 0) return value;
  return value * powerOf(units.h, lengthPower);
}

/** The key under which the number stands in JSON, CSV and ECSV in the chosen units. */
export function shownKey<Row>(quantity: Quantity<Row>, units: ShownUnits): string {
  return units.perH ? (quantity.keyPerH ?? quantity.key) : quantity.key;
}

/** Unit for people in the chosen units, empty for plain numbers. */
export function shownUnit<Row>(quantity: Quantity<Row>, units: ShownUnits): string {
  return UNITS[quantity.unit].plain[units.perH ? 1 : 0];
}

/** The number of a row that stands alone, rounded for reading; '-' for none. */
export function shownText<Row>(quantity: Quantity<Row>, row: Row, units: ShownUnits): string {
  return shownColumn(quantity, [row], units)(row);
}

/**
 * The numbers of a column rounded for reading, the same in the window, in tables and in LaTeX; '-' for none. All are
 * written by powers of ten where one of them has to be: numbers that are read one below the other look alike.
 * @param rows all that stand in the column, a row of totals too
 */
export function shownColumn<Row>(
  quantity: Quantity<Row>,
  rows: readonly Row[],
  units: ShownUnits,
): (row: Row) => string {
  const powers = rows.some((row) => needsPower(shownValue(quantity, row, units) ?? 0, quantity.show));
  return (row) => {
    const value = shownValue(quantity, row, units);
    return value === null ? '-' : formatNumber(value, quantity.show, powers);
  };
}

type Show = { readonly decimals: number } | { readonly significant: number };

function needsPower(value: number, show: Show): boolean {
  const size = Math.abs(value);
  return 'significant' in show && Number.isFinite(value) && value !== 0 && (size < 1e-3 || size >= 1e6);
}

/**
 * Plain decimals where they are short, else a mantissa and a power of ten; never loses the sign or NaN.
 * @param powers a power of ten in any case, but for 0 and for numbers shown by decimals
 */
export function formatNumber(value: number, show: Show, powers = false): string {
  if (!Number.isFinite(value)) return String(value);
  if ('decimals' in show) return value.toFixed(show.decimals);
  if (value === 0) return '0';
  if (!powers && !needsPower(value, show))
    return value.toPrecision(show.significant).includes('e')
      ? value.toFixed(0)
      : value.toPrecision(show.significant);
  return value.toExponential(show.significant - 1).replace('e+', 'e');
}
