import type { PointLook } from '../galaxies/placePoints.ts';

const MOMENTS = 8;

/**
 * How galaxies are drawn at every moment of a film: measured at a few moments and carried from one to the next by equal
 * ratios, so that the light does not flicker with each frame's own count.
 *
 * @param lookAt what suits the galaxies at a share of the film
 */
export function steadyLook(lookAt: (share: number) => PointLook): (share: number) => PointLook {
  const looks = Array.from({ length: MOMENTS + 1 }, (_, i) => lookAt(i / MOMENTS));
  const between = (a: number, b: number, t: number): number => (a > 0 && b > 0 ? a * (b / a) ** t : a);
  return (share) => {
    const at = Math.min(1, Math.max(0, share)) * MOMENTS;
    const i = Math.min(MOMENTS - 1, Math.floor(at));
    const [a, b] = [looks[i]!, looks[i + 1]!];
    const t = at - i;
    return {
      diameter: between(a.diameter, b.diameter, t),
      densest: between(a.densest, b.densest, t),
      thinnest: between(a.thinnest, b.thinnest, t),
    };
  };
}
