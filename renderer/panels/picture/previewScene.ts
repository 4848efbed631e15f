import type { Scene } from '../../picture/scene.ts';

/** More pixels than this are no better to look at on a screen, and take long. */
const MOST_PREVIEW_PIXELS = 2_500_000;

/**
 * The same scene at a size that fits, never larger than the picture itself.
 * @param room pixels across and down
 */
export function previewScene(scene: Scene, room: readonly [number, number]): Scene {
  const { widthPx, heightPx, pxPerUnit } = scene;
  const share = Math.min(
    1,
    room[0] / widthPx,
    room[1] / heightPx,
    Math.sqrt(MOST_PREVIEW_PIXELS / (widthPx * heightPx)),
  );
  const scaled = (px: number): number => Math.max(1, Math.round(px * share));
  return {
    ...scene,
    widthPx: scaled(widthPx),
    heightPx: scaled(heightPx),
    pxPerUnit: pxPerUnit * share,
  };
}
