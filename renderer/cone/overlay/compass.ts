import type { Pen } from './pen.ts';

/** Which way the sky lies when one looks down the cone from the observer's seat. */
export function compassOf(pen: Pen): void {
  const [x, y] = [pen.width - 46, 62];
  const colour = pen.theme.inkMuted;
  pen.line(
    [
      [x, y],
      [x, y - 26],
    ],
    colour,
    1.2,
  );
  pen.line(
    [
      [x, y],
      [x - 26, y],
    ],
    colour,
    1.2,
  );
  pen.text('N', x, y - 35, colour);
  pen.text('E', x - 35, y, colour);
}
