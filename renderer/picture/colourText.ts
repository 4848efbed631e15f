import type { Paint } from './scene.ts';

/** Reads the colour notations that the program itself writes: #rrggbb, rgb(r g b) and rgb(r g b / alpha). */
export function readColour(css: string): Paint {
  const hex = /^#([0-9a-f]{2})([0-9a-f]{2})([0-9a-f]{2})$/i.exec(css);
  if (hex)
    return {
      colour: [1, 2, 3].map((i) => Number.parseInt(hex[i]!, 16)) as unknown as Paint['colour'],
      alpha: 1,
    };
  const rgb = /^rgb\((\d+) (\d+) (\d+)(?: \/ ([\d.]+))?\)$/.exec(css);
  if (!rgb) throw new Error(`the colour ${css} is not one that pictures read`);
  return {
    colour: [Number(rgb[1]), Number(rgb[2]), Number(rgb[3])],
    alpha: rgb[4] === undefined ? 1 : Number(rgb[4]),
  };
}
