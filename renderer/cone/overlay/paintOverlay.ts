import { comovingRulerY, PINNED_TOP_PX, upperIsPinned } from './alignedRulers.ts';
import { compassOf } from './compass.ts';
import { paintCone } from './coneRulers.ts';
import { inLargerPixels } from './enlarged.ts';
import { keepClearOfMarks, paintMarks } from './marks.ts';
import type { Pen } from './pen.ts';
import { paintRings } from './ringRulers.ts';
import { drawScaleBar } from './scaleBar.ts';
import type { OverlayScene } from './scene.ts';
import { paintShellLabels, paintShells } from './shellPaint.ts';

/** Paints lines, rulers, labels and marks over points and solids. */
export function paintOverlay(pen: Pen, scene: OverlayScene): void {
  const { enlarged = 1 } = pen.theme;
  if (enlarged === 1) {
    paint(pen, scene);
    return;
  }
  pen.context.save();
  pen.context.scale(enlarged, enlarged);
  paint(...inLargerPixels(pen, scene, enlarged));
  pen.context.restore();
}

function paint(pen: Pen, scene: OverlayScene): void {
  paintShells(pen, scene);
  const top = 20 + (upperIsPinned(pen, scene) ? PINNED_TOP_PX + 4 : 0);
  for (const [i, line] of scene.caption.entries()) {
    const x = 18 + pen.measure(line) / 2;
    pen.text(line, x, top + 17 * i, pen.theme.inkMuted, { gap: 0 });
  }
  const rings = scene.lanes.length > 0 && scene.lanes.every((lane) => lane.shape.surrounds);
  // Told before the rulers so that no number can take its place.
  paintScaleBar(pen, scene);
  if (rings || scene.lanes.length === 0) paintRings(pen, scene);
  else paintCone(pen, scene);
  keepClearOfMarks(pen, scene.marks);
  paintShellLabels(pen, scene);
  if (scene.view === 'downTheCone') compassOf(pen);
  paintMarks(pen, scene.marks);
}

function paintScaleBar(pen: Pen, scene: OverlayScene): void {
  if (scene.reading !== 'comoving' || scene.perspective) return;
  const mpcPerPixel = scene.unitsPerPixel * scene.farMpc;
  let y = pen.height - 20;
  if (scene.aligned) {
    // Clear of the comoving ruler: at the bottom where there is room below it, else above it.
    const ruler = comovingRulerY(pen, scene);
    const room = pen.height - ruler;
    if (room < 72) y = room >= 61 ? pen.height - 13 : ruler - (room < 40 ? 44 : 34);
  }
  drawScaleBar(pen, y, mpcPerPixel, scene.scale.lengthUnitMpc, (mpc) => scene.scale.formatLength(mpc));
}
