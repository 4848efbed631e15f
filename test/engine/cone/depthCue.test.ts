import { expect, it } from 'vitest';
import { ConeModel } from '../../../renderer/cone/coneModel.ts';
import { depthCue, depthRange, lightAt } from '../../../renderer/cone/geometry/depthCue.ts';
import { SKY_FRAME } from '../../../renderer/cone/geometry/fieldFrame.ts';
import { lookingFrom } from '../../../renderer/cone/geometry/poses.ts';
import { prepareFields } from '../../../renderer/cone/geometry/preparedField.ts';
import { modelMatrix, type Pose } from '../../../renderer/cone/geometry/projection.ts';

/** From the end of the x axis, toward the origin: what has a large x is near. */
const pose: Pose = {
  axes: lookingFrom([1, 0, 0], [0, 0, 1]),
  target: [0, 0, 0],
  unitsPerPixel: 0.01,
  perspective: 0,
};
const model = modelMatrix(SKY_FRAME, 1, 0);

it('keeps all light nearest, the rest by even steps of depth, and no less than its share beyond', () => {
  const range = depthRange(pose, [1, 9, 9, -1, 5, 5, 0, 0, 0]);
  expect(range).toEqual({ near: -1, far: 1 });
  const cue = depthCue(pose, model, range, 0.5)!;
  const at = (x: number): number => lightAt(cue, x, 0.3, -0.2);
  expect([at(1), at(0.5), at(0), at(-1)].map((v) => Number(v.toFixed(12)))).toEqual([1, 0.875, 0.75, 0.5]);
  expect([at(7), at(-7)]).toEqual([1, 0.5]);
});

it('follows a field that is stretched and lifted', () => {
  const range = { near: -2, far: 2 };
  const from: Pose = { ...pose, axes: lookingFrom([0, 1, 0], [0, 0, 1]) };
  const cue = depthCue(from, modelMatrix(SKY_FRAME, 3, 0.5), range, 1)!;
  // Display y is 3 y + 0.5, and nearer the larger it is.
  expect(lightAt(cue, 0.4, 0.1, 0.7)).toBeCloseTo((2 + 3 * 0.1 + 0.5) / 4, 12);
});

it('is nothing where it is off, and where there is no depth', () => {
  expect(depthCue(pose, model, { near: -1, far: 1 }, 0)).toBeNull();
  expect(depthCue(pose, model, { near: 1, far: 1 }, 0.5)).toBeNull();
});

it('reaches through the whole of a sky without an outline, from wherever it is seen', () => {
  const model = new ConeModel();
  model.setViewport({ widthPx: 600, heightPx: 400 });
  const sky = { fields: [], wide: true };
  model.setFields(prepareFields(sky), sky);
  for (const from of [
    [1, 0, 0],
    [0, 0, 1],
    [0.1, 0, 0.995],
  ] as const) {
    const axes = lookingFrom(from, from[2] > 0.9 ? [0, 1, 0] : [0, 0, 1]);
    const shown = { pose: { ...pose, axes } };
    const { near, far } = model.depth(shown, model.lanes(model.shown(0).factors));
    // A sphere of radius 1 around the observer.
    expect(near).toBeCloseTo(-1, 9);
    expect(far).toBeCloseTo(1, 9);
  }
});
