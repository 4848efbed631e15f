import { colourMap, type Ground } from './colourMap.ts';

export interface LegendStop {
  /** 0 at the low end of the legend, 1 at the high end. */
  readonly position: number;
  readonly css: string;
}

export interface Legend {
  readonly stops: readonly LegendStop[];
  /** Ready for `background:` of an element, low end at the left. */
  readonly cssGradient: string;
}

/** What a legend of a colour map needs: colours at even steps, low values first (last when reversed). */
export function legend(map: string, ground: Ground, reversed = false, steps = 17): Legend {
  const { bytes } = colourMap(map, ground);
  const stops: LegendStop[] = [];
  for (let i = 0; i < steps; i++) {
    const position = steps > 1 ? i / (steps - 1) : 0;
    const at = 3 * Math.round(255 * (reversed ? 1 - position : position));
    stops.push({ position, css: `rgb(${bytes[at]} ${bytes[at + 1]} ${bytes[at + 2]})` });
  }
  const list = stops.map((stop) => `${stop.css} ${+(100 * stop.position).toFixed(2)}%`).join(', ');
  return { stops, cssGradient: `linear-gradient(to right, ${list})` };
}
