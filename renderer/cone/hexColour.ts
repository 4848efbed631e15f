import type { Triple } from '../colour/oklab.ts';

/** sRGB bytes of a colour as themes write it. @throws Error for anything but #rrggbb */
export function hexColour(css: string): Triple {
  const parts = /^#([\da-f]{2})([\da-f]{2})([\da-f]{2})$/i.exec(css);
  if (parts === null) throw new Error(`A theme's colour is "${css}"; #rrggbb was expected.`);
  return [parts[1]!, parts[2]!, parts[3]!].map((two) => Number.parseInt(two, 16)) as unknown as Triple;
}
