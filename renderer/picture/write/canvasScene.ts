import type { Tile } from '../galaxies/tilePoints.ts';
import type { Paint, PathItem, Scene, SceneItem, Stroke, TextItem } from '../scene.ts';
import { FONT_FAMILY } from '../text/measure.ts';
import { isRightToLeft } from '../text/writing.ts';

type Context = OffscreenCanvasRenderingContext2D;

/** Paints the part of a scene that lies in a tile. The tile's corner is moved by whole pixels, so that tiles fit. */
export function paintTile(
  context: Context,
  scene: Scene,
  tile: Tile,
  points: (context: Context) => void,
): void {
  context.setTransform(1, 0, 0, 1, 0, 0);
  context.globalAlpha = 1;
  context.clearRect(0, 0, tile.width, tile.height);
  if (scene.background) {
    context.fillStyle = css({ colour: scene.background, alpha: 1 });
    context.fillRect(0, 0, tile.width, tile.height);
  }
  const s = scene.pxPerUnit;
  const [top, bottom] = [tile.top / s, (tile.top + tile.height) / s];
  for (const item of scene.items) {
    if (item.kind === 'points') {
      context.setTransform(1, 0, 0, 1, 0, 0);
      points(context);
    } else {
      const [low, high] = heightOf(item);
      if (high < top || low > bottom) continue;
      context.setTransform(s, 0, 0, s, -tile.left, -tile.top);
      paintItem(context, item);
    }
  }
}

/** Least and greatest y that an item can reach, generously. */
function heightOf(item: Exclude<SceneItem, { kind: 'points' }>): [number, number] {
  if (item.kind === 'circle') return [item.y - item.radius - 10, item.y + item.radius + 10];
  if (item.kind === 'text') {
    const reach = item.angle === 0 ? 2 * item.size + 10 : item.size * (item.text.length + 2);
    return [item.y - reach, item.y + reach];
  }
  let low = Number.POSITIVE_INFINITY;
  let high = Number.NEGATIVE_INFINITY;
  for (const run of item.runs)
    for (let i = 1; i < run.length; i += 2) {
      low = Math.min(low, run[i]!);
      high = Math.max(high, run[i]!);
    }
  return [low - 20, high + 20];
}

function paintItem(context: Context, item: Exclude<SceneItem, { kind: 'points' }>): void {
  if (item.kind === 'text') {
    paintText(context, item);
    return;
  }
  context.beginPath();
  if (item.kind === 'circle') context.arc(item.x, item.y, item.radius, 0, 2 * Math.PI);
  else trace(context, item);
  if (item.fill) {
    context.fillStyle = css(item.fill);
    context.fill(item.kind === 'path' && item.evenOdd ? 'evenodd' : 'nonzero');
  }
  if (item.stroke) {
    applyStroke(context, item.stroke);
    context.stroke();
  }
}

function trace(context: Context, { runs, closed }: PathItem): void {
  for (const run of runs) {
    context.moveTo(run[0]!, run[1]!);
    for (let i = 2; i < run.length; i += 2) context.lineTo(run[i]!, run[i + 1]!);
    if (closed) context.closePath();
  }
}

function applyStroke(context: Context, stroke: Stroke): void {
  context.strokeStyle = css(stroke);
  context.lineWidth = stroke.width;
  context.setLineDash(stroke.dash as number[]);
  context.lineJoin = 'round';
  context.lineCap = 'butt';
}

function paintText(context: Context, item: TextItem): void {
  context.translate(item.x, item.y);
  context.rotate(item.angle);
  context.font = `${item.bold ? 700 : 400} ${item.size}px ${FONT_FAMILY}`;
  context.textAlign = item.anchor === 'middle' ? 'center' : item.anchor === 'end' ? 'right' : 'left';
  context.textBaseline = 'alphabetic';
  context.direction = isRightToLeft(item.text) ? 'rtl' : 'ltr';
  if (item.halo) {
    applyStroke(context, item.halo);
    context.strokeText(item.text, 0, 0);
  }
  context.fillStyle = css(item.paint);
  context.fillText(item.text, 0, 0);
}

const css = ({ colour: [r, g, b], alpha }: Paint): string => `rgb(${r} ${g} ${b} / ${alpha})`;
