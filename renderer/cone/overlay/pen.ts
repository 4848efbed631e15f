import type { ConeTheme } from '../types.ts';
import { type Box, LabelPlacer } from './labelPlacer.ts';

export type Point = readonly [x: number, y: number];

/** A 2D context with the theme, and texts that keep apart. Everything in CSS pixels. */
export class Pen {
  readonly context: CanvasRenderingContext2D;
  readonly theme: ConeTheme;
  readonly labels: LabelPlacer;
  readonly width: number;
  readonly height: number;

  constructor(context: CanvasRenderingContext2D, theme: ConeTheme, width: number, height: number) {
    this.context = context;
    this.theme = theme;
    this.width = width;
    this.height = height;
    this.labels = new LabelPlacer({ x: 4, y: 4, width: width - 8, height: height - 8 });
  }

  font(sizePx: number, weight = 400): void {
    this.context.font = `${weight} ${sizePx}px ${this.theme.fontFamily}`;
  }

  line(
    points: readonly (Point | null)[],
    colour: string,
    widthPx: number,
    dash: readonly number[] = [],
  ): void {
    const { context } = this;
    context.beginPath();
    let down = false;
    for (const p of points) {
      if (!p) down = false;
      else if (down) context.lineTo(p[0], p[1]);
      else {
        context.moveTo(p[0], p[1]);
        down = true;
      }
    }
    context.setLineDash(dash as number[]);
    context.strokeStyle = colour;
    context.lineWidth = widthPx;
    context.lineJoin = 'round';
    context.stroke();
    context.setLineDash([]);
  }

  /**
   * Text with its middle at a point, on a halo of the ground so that it reads over galaxies. Not drawn where it would
   * touch an earlier text or leave the stage; says whether it was drawn. A plate of the ground makes it read over a
   * crowd of galaxies too.
   */
  text(
    text: string,
    x: number,
    y: number,
    colour: string,
    options: { sizePx?: number; weight?: number; gap?: number; must?: boolean; plate?: boolean } = {},
  ): boolean {
    const { context } = this;
    const size = options.sizePx ?? 11.5;
    this.font(size, options.weight);
    const width = context.measureText(text).width;
    const box = { x: x - width / 2, y: y - size * 0.62, width, height: size * 1.24 };
    if (options.must) this.labels.reserve(box);
    else if (!this.labels.place(box, options.gap)) return false;
    if (options.plate) this.plate(box);
    this.write(text, x, y, colour);
    return true;
  }

  private plate({ x, y, width, height }: Box): void {
    const { context } = this;
    context.globalAlpha = 0.82;
    context.fillStyle = this.theme.background;
    context.fillRect(x - 4, y - 1, width + 8, height + 2);
    context.globalAlpha = 1;
  }

  /** A band of the ground over the picture, from one height to another, so that rulers on it read well. */
  veil(fromY: number, toY: number): void {
    const { context } = this;
    context.globalAlpha = 0.72;
    context.fillStyle = this.theme.background;
    context.fillRect(0, fromY, this.width, toY - fromY);
    context.globalAlpha = 1;
  }

  ring(p: Point, radiusPx: number, colour: string, widthPx: number): void {
    const { context } = this;
    context.beginPath();
    context.arc(p[0], p[1], radiusPx, 0, 2 * Math.PI);
    context.strokeStyle = colour;
    context.lineWidth = widthPx;
    context.stroke();
  }

  disc(p: Point, radiusPx: number, colour: string): void {
    const { context } = this;
    context.beginPath();
    context.arc(p[0], p[1], radiusPx, 0, 2 * Math.PI);
    context.fillStyle = colour;
    context.fill();
  }

  /** Writes at the point with the halo, in the font that is set. */
  write(text: string, x: number, y: number, colour: string): void {
    const { context } = this;
    context.textAlign = 'center';
    context.textBaseline = 'middle';
    context.strokeStyle = this.theme.background;
    context.lineWidth = 3.5;
    context.lineJoin = 'round';
    context.globalAlpha = 0.75;
    context.strokeText(text, x, y);
    context.globalAlpha = 1;
    context.fillStyle = colour;
    context.fillText(text, x, y);
  }

  /** Width of a text in the size of labels. */
  measure(text: string, sizePx = 11.5, weight = 400): number {
    this.font(sizePx, weight);
    return this.context.measureText(text).width;
  }
}
