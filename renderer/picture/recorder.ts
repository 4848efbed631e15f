import { readColour } from './colourText.ts';
import type { Paint, SceneItem, Stroke, TextItem } from './scene.ts';
import { textWidth } from './text/measure.ts';

/** From the middle of a line of text to its baseline, as a share of the type size. */
const MIDDLE_TO_BASELINE = 0.35;

type Matrix = readonly [a: number, b: number, c: number, d: number, e: number, f: number];

interface State {
  readonly matrix: Matrix;
  readonly strokeStyle: string;
  readonly fillStyle: string;
  readonly lineWidth: number;
  readonly globalAlpha: number;
  readonly font: string;
  readonly dash: readonly number[];
}

/**
 * The part of a 2D drawing context that the overlay of the cone uses. Instead of pixels it makes items of a scene, so
 * that the window's own drawing functions draw pictures. Transformations are moves and turns only.
 */
export class RecordingContext {
  readonly items: SceneItem[] = [];
  strokeStyle = '#000000';
  fillStyle = '#000000';
  lineWidth = 1;
  lineJoin: CanvasLineJoin = 'round';
  lineCap: CanvasLineCap = 'butt';
  globalAlpha = 1;
  font = '400 10px sans-serif';
  textAlign: CanvasTextAlign = 'start';
  textBaseline: CanvasTextBaseline = 'alphabetic';
  private dash: readonly number[] = [];
  private matrix: Matrix;
  private readonly stack: State[] = [];
  private runs: number[][] = [];
  private closed = false;
  private circle: { x: number; y: number; radius: number } | null = null;
  private halo: { text: string; stroke: Stroke } | null = null;

  /** @param left,top where the context's own zero lies in the scene */
  constructor(left = 0, top = 0) {
    this.matrix = [1, 0, 0, 1, left, top];
  }

  save(): void {
    const { matrix, strokeStyle, fillStyle, lineWidth, globalAlpha, font, dash } = this;
    this.stack.push({ matrix, strokeStyle, fillStyle, lineWidth, globalAlpha, font, dash });
  }

  restore(): void {
    const state = this.stack.pop();
    if (state) Object.assign(this, state);
  }

  translate(x: number, y: number): void {
    const [a, b, c, d, e, f] = this.matrix;
    this.matrix = [a, b, c, d, a * x + c * y + e, b * x + d * y + f];
  }

  rotate(angle: number): void {
    const [a, b, c, d, e, f] = this.matrix;
    const [cos, sin] = [Math.cos(angle), Math.sin(angle)];
    this.matrix = [a * cos + c * sin, b * cos + d * sin, c * cos - a * sin, d * cos - b * sin, e, f];
  }

  setLineDash(dash: readonly number[]): void {
    this.dash = [...dash];
  }

  beginPath(): void {
    this.runs = [];
    this.closed = false;
    this.circle = null;
  }

  moveTo(x: number, y: number): void {
    this.runs.push([...this.at(x, y)]);
  }

  lineTo(x: number, y: number): void {
    const run = this.runs.at(-1);
    if (run) run.push(...this.at(x, y));
    else this.moveTo(x, y);
  }

  closePath(): void {
    this.closed = true;
  }

  /** Whole circles alone. */
  arc(x: number, y: number, radius: number): void {
    const [px, py] = this.at(x, y);
    this.circle = { x: px, y: py, radius };
  }

  stroke(): void {
    const { colour, alpha } = this.paint(this.strokeStyle);
    this.emit(null, { colour, alpha, width: this.lineWidth, dash: this.dash }, false);
  }

  fill(rule: CanvasFillRule = 'nonzero'): void {
    this.emit(this.paint(this.fillStyle), null, rule === 'evenodd');
  }

  fillRect(x: number, y: number, width: number, height: number): void {
    this.beginPath();
    this.moveTo(x, y);
    this.lineTo(x + width, y);
    this.lineTo(x + width, y + height);
    this.lineTo(x, y + height);
    this.closePath();
    this.fill();
  }

  measureText(text: string): { width: number } {
    const { size, weight } = this.type();
    return { width: textWidth(text, size, weight) };
  }

  strokeText(text: string, _x: number, _y: number): void {
    const { colour, alpha } = this.paint(this.strokeStyle);
    this.halo = { text, stroke: { colour, alpha, width: this.lineWidth, dash: [] } };
  }

  fillText(text: string, x: number, y: number): void {
    const { size, weight } = this.type();
    const baseline = y + (this.textBaseline === 'middle' ? size * MIDDLE_TO_BASELINE : 0);
    const [px, py] = this.at(x, baseline);
    this.items.push({
      kind: 'text',
      text,
      x: px,
      y: py,
      anchor: this.anchor(),
      size,
      bold: weight >= 600,
      angle: Math.atan2(this.matrix[1], this.matrix[0]),
      paint: this.paint(this.fillStyle),
      halo: this.halo?.text === text ? this.halo.stroke : null,
    });
    this.halo = null;
  }

  private anchor(): TextItem['anchor'] {
    if (this.textAlign === 'center') return 'middle';
    return this.textAlign === 'right' || this.textAlign === 'end' ? 'end' : 'start';
  }

  private emit(fill: Paint | null, stroke: Stroke | null, evenOdd: boolean): void {
    if (this.circle) this.items.push({ kind: 'circle', ...this.circle, fill, stroke });
    const runs = this.runs.filter((run) => run.length >= 4).map((run) => Float64Array.from(run));
    if (runs.length > 0) this.items.push({ kind: 'path', runs, closed: this.closed, fill, evenOdd, stroke });
  }

  private paint(style: string): Paint {
    const { colour, alpha } = readColour(style);
    return { colour, alpha: alpha * this.globalAlpha };
  }

  private type(): { size: number; weight: number } {
    const [, weight, size] = /^(\d+) ([\d.]+)px/.exec(this.font) ?? [];
    return { size: Number(size), weight: Number(weight) };
  }

  private at(x: number, y: number): [number, number] {
    const [a, b, c, d, e, f] = this.matrix;
    return [a * x + c * y + e, b * x + d * y + f];
  }
}
