import type { CircleItem, Paint, PathItem, Scene, Stroke, TextItem } from '../scene.ts';
import { textWidth } from '../text/measure.ts';
import { pdfRuns } from '../text/pdfText.ts';
import { pdfNumber as n } from './pdfFile.ts';

/** From the middle of a circle's arc to its control points (the usual four Bezier arcs; error below 0.03%). */
const KAPPA = 0.5522847498;

/** What a page's drawing consists of: the operators, and the opacities that they name. */
export interface PdfContent {
  readonly operators: string;
  /** Opacity by the name of its graphics state. */
  readonly opacities: ReadonlyMap<number, string>;
}

/**
 * A scene as operators of a page (ISO 32000-1, clauses 8 and 9): fonts /F1 (regular), /F2 (bold) and /F3 (symbols),
 * the galaxies as image /Points.
 *
 * @param unit points of one unit of the scene
 */
export function pdfContent(scene: Scene, unit: number): PdfContent {
  const opacities = new Map<number, string>();
  const opacity = (alpha: number): string => {
    const rounded = Math.round(alpha * 1000) / 1000;
    if (!opacities.has(rounded)) opacities.set(rounded, `A${opacities.size}`);
    return `/${opacities.get(rounded)} gs`;
  };
  // Units, y downward, from the top left.
  const out = [`${n(unit)} 0 0 ${n(-unit)} 0 ${n(scene.height * unit)} cm`, '1 j'];
  if (scene.background)
    out.push(`${rgb(scene.background)} rg`, `0 0 ${n(scene.width)} ${n(scene.height)} re f`);
  for (const item of scene.items) {
    if (item.kind === 'text') out.push(...textOperators(item, opacity));
    else if (item.kind !== 'points') out.push(...shapeOperators(item, opacity));
    else if (scene.points.count > 0)
      out.push(
        opacity(1),
        `q ${n(scene.width)} 0 0 ${n(-scene.height)} 0 ${n(scene.height)} cm /Points Do Q`,
      );
  }
  return { operators: out.join('\n'), opacities };
}

type Opacity = (alpha: number) => string;

function shapeOperators(item: PathItem | CircleItem, opacity: Opacity): string[] {
  const path = item.kind === 'circle' ? circlePath(item) : runsPath(item);
  const out: string[] = [];
  if (item.fill)
    out.push(
      opacity(item.fill.alpha),
      `${rgb(item.fill.colour)} rg`,
      path,
      item.kind === 'path' && item.evenOdd ? 'f*' : 'f',
    );
  if (item.stroke) out.push(...strokeState(item.stroke, opacity), path, 'S');
  return out;
}

const strokeState = ({ colour, alpha, width, dash }: Stroke, opacity: Opacity): string[] => [
  opacity(alpha),
  `${rgb(colour)} RG ${n(width)} w [${dash.map(n).join(' ')}] 0 d`,
];

function runsPath({ runs, closed }: PathItem): string {
  const out: string[] = [];
  for (const run of runs) {
    for (let i = 0; i < run.length; i += 2)
      out.push(`${n(run[i]!)} ${n(run[i + 1]!)} ${i === 0 ? 'm' : 'l'}`);
    if (closed) out.push('h');
  }
  return out.join(' ');
}

function circlePath({ x, y, radius: r }: CircleItem): string {
  const k = KAPPA * r;
  const curve = (...values: number[]): string => `${values.map(n).join(' ')} c`;
  return [
    `${n(x + r)} ${n(y)} m`,
    curve(x + r, y + k, x + k, y + r, x, y + r),
    curve(x - k, y + r, x - r, y + k, x - r, y),
    curve(x - r, y - k, x - k, y - r, x, y - r),
    curve(x + k, y - r, x + r, y - k, x + r, y),
    'h',
  ].join(' ');
}

function textOperators(item: TextItem, opacity: Opacity): string[] {
  const runs = pdfRuns(item.text) ?? [];
  const { size, angle, bold } = item;
  const width = textWidth(item.text, size, bold ? 700 : 400);
  const back = item.anchor === 'middle' ? width / 2 : item.anchor === 'end' ? width : 0;
  const [c, s] = [Math.cos(angle), Math.sin(angle)];
  // The page is turned upside down, letters must stand upright on it.
  const place = `${n(c)} ${n(s)} ${n(s)} ${n(-c)} ${n(item.x - back * c)} ${n(item.y - back * s)} Tm`;
  const shown = runs
    .map(
      ({ font, bytes }) =>
        `/${font === 'symbol' ? 'F3' : bold ? 'F2' : 'F1'} ${n(size)} Tf <${hex(bytes)}> Tj`,
    )
    .join(' ');
  const write = (mode: number): string => `BT ${mode} Tr ${place} ${shown} ET`;
  const fill: Paint = item.paint;
  const halo = item.halo ? [...strokeState(item.halo, opacity), write(1)] : [];
  return [...halo, opacity(fill.alpha), `${rgb(fill.colour)} rg`, write(0)];
}

const hex = (bytes: readonly number[]): string =>
  bytes.map((byte) => byte.toString(16).padStart(2, '0')).join('');

const rgb = (colour: readonly number[]): string => colour.map((byte) => n(byte / 255)).join(' ');
