import { project } from '../geometry/projection.ts';
import type { RadialReading } from '../types.ts';
import { paintObserver } from './observer.ts';
import type { Pen, Point } from './pen.ts';
import { drawRuler } from './ruler.ts';
import type { OverlayScene } from './scene.ts';

/** A full circle of a radius about the observer, in the plane that the view faces. */
function circleAt(scene: OverlayScene, radius: number): (Point | null)[] {
  const steps = 180;
  return Array.from({ length: steps + 1 }, (_, i) => {
    const angle = (2 * Math.PI * i) / steps;
    return project(scene.pixels, Math.cos(angle), Math.sin(angle), 0, radius);
  });
}

/** Spokes: where each ruler's numbers stand, as an angle from the right, counter-clockwise. */
const SPOKES: readonly { readonly which: RadialReading; readonly angle: number }[] = [
  { which: 'comoving', angle: 0 },
  { which: 'redshift', angle: Math.PI },
  { which: 'lookback', angle: Math.PI * 0.3 },
];

/** Rulers as rings about the observer, for the whole sky; the rings are those of the reading. */
export function paintRings(pen: Pen, scene: OverlayScene): void {
  const { rulers, titles } = scene.scale;
  for (const tick of rulers[scene.reading]) {
    if (tick.level === 0 && tick.comovingMpc > 0) {
      pen.line(circleAt(scene, scene.radius(tick.comovingMpc)), pen.theme.line, 1);
    }
  }
  paintObserver(pen, scene, { lift: 0 }, false);
  for (const { which, angle } of SPOKES) {
    const [c, s] = [Math.cos(angle), Math.sin(angle)];
    const at = (mpc: number): Point | null =>
      project(scene.pixels, c * scene.radius(mpc), s * scene.radius(mpc), 0);
    const [start, end] = [at(0), at(scene.farMpc)];
    if (!start || !end) continue;
    // Marks point to the lower side of the spoke; the title stands beyond its end, outside the sphere.
    const awayFrom: Point = [
      (start[0] + end[0]) / 2 - 1000 * s,
      (start[1] + end[1]) / 2 - 1000 * Math.abs(c),
    ];
    const ticks = rulers[which].filter((tick) => tick.comovingMpc > 0);
    drawRuler(pen, { title: '', ticks, at, fromMpc: 0, toMpc: scene.farMpc, awayFrom });
    const half = pen.measure(titles[which], 11) / 2;
    const away = half * Math.abs(c) + 14;
    const x = end[0] + c * away + (c > 0.1 && c < 0.9 ? half * 0.5 : 0);
    const y = end[1] - s * 14;
    const inside = Math.min(pen.width - half - 6, Math.max(half + 6, x));
    // Behind the end of its spoke, or where the stage is too narrow for that, below its numbers or above it.
    for (const [px, py] of [
      [x, y],
      [inside, y + 36],
      [inside, y - 20],
    ] as const)
      if (pen.text(titles[which], px, py, pen.theme.inkMuted, { sizePx: 11 })) break;
  }
}
