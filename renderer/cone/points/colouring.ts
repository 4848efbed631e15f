import { colourMap, type Ground } from '../../colour/colourMap.ts';
import { shellColours } from '../../colour/shellColours.ts';
import type { ColouringInput, ShellInput } from '../types.ts';
import { type RadiusTable, radiusAt } from './radiusTable.ts';

/** Index of a galaxy whose value is not known: grey. */
export const UNKNOWN = 0;
/** The lowest value's index: clear of the unknown by more than a step of the tone table. */
const LOWEST = 2;

/** Colour index (2..255) of a value read between two ends; values beyond an end have its colour, NaN is UNKNOWN. */
export function colourIndex(value: number, from: number, to: number): number {
  const t = (value - from) / (to - from);
  if (Number.isNaN(t)) return UNKNOWN;
  return t > 0 ? (t < 1 ? LOWEST + Math.round((255 - LOWEST) * t) : 255) : LOWEST;
}

/** The index for galaxies nearer than all shells is 0, beyond them 255; shells stand evenly between. */
export const shellIndex = (shell: number, shells: number): number =>
  Math.round((255 * (shell + 1)) / (shells + 1));

/** A function from comoving distance to the colour index of the shell that holds it. */
export function shellIndexer(shells: readonly ShellInput[]): (comovingMpc: number) => number {
  const edges = Float64Array.from(shells, (shell) => shell.comovingMinMpc);
  const ends = Float64Array.from(shells, (shell) => shell.comovingMaxMpc);
  const n = shells.length;
  return (mpc) => {
    let low = 0;
    let high = n;
    while (low < high) {
      const middle = (low + high) >> 1;
      if (edges[middle]! <= mpc) low = middle + 1;
      else high = middle;
    }
    if (low === 0) return 0;
    if (mpc < ends[low - 1]! || (low === n && mpc === ends[n - 1])) return shellIndex(low - 1, n);
    return low === n ? 255 : Math.round((shellIndex(low - 1, n) + shellIndex(low, n)) / 2);
  };
}

/** Colour index of a galaxy by catalogue row and comoving distance. */
export function indexer(
  colouring: ColouringInput,
  shells: readonly ShellInput[],
  table: RadiusTable,
): (row: number, comovingMpc: number) => number {
  switch (colouring.kind) {
    case 'values': {
      const { values, from, to } = colouring;
      return (row) => colourIndex(values[row]!, from, to);
    }
    case 'shell': {
      const index = shellIndexer(shells);
      return (_, mpc) => index(mpc);
    }
    case 'radius':
      return (_, mpc) => colourIndex(radiusAt(table, mpc), 0, 1);
  }
}

/** The 256 colours (sRGB bytes) that the indices stand for. */
export function palette(colouring: ColouringInput, shells: number, ground: Ground): Uint8Array {
  if (colouring.kind === 'shell') return shellPalette(shells, ground);
  const { bytes } = colourMap(colouring.map, ground);
  const out = bytes.slice();
  if (colouring.reversed) {
    for (let i = 0; i < 256; i++) out.set(bytes.subarray(3 * (255 - i), 3 * (255 - i) + 3), 3 * i);
  }
  out.set(GREY[ground], 3 * UNKNOWN);
  return out;
}

const GREY: Readonly<Record<Ground, readonly [number, number, number]>> = {
  dark: [120, 124, 132],
  light: [150, 154, 160],
};

/** Colours of the shells at their indices, grey at both ends, and even mixtures between. */
function shellPalette(shells: number, ground: Ground): Uint8Array {
  const grey = GREY[ground];
  const stops = [grey, ...shellColours(shells, ground), grey];
  const places = stops.map((_, i) =>
    i === stops.length - 1 ? 255 : i === 0 ? 0 : shellIndex(i - 1, shells),
  );
  const out = new Uint8Array(256 * 3);
  for (let i = 0, stop = 0; i < 256; i++) {
    while (stop < stops.length - 2 && places[stop + 1]! <= i) stop++;
    const t = (i - places[stop]!) / (places[stop + 1]! - places[stop]!);
    for (let k = 0; k < 3; k++) {
      out[3 * i + k] = Math.round(stops[stop]![k]! * (1 - t) + stops[stop + 1]![k]! * t);
    }
  }
  return out;
}
