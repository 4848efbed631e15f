import { describe, expect, it } from 'vitest';
import { ConeModel } from '../../../renderer/cone/coneModel.ts';
import {
  fittingView,
  laneHeights,
  lanes,
  niceFactor,
  proposeSidewaysFactor,
} from '../../../renderer/cone/geometry/arrangement.ts';
import { fieldFrame, lateralExtent } from '../../../renderer/cone/geometry/fieldFrame.ts';
import {
  axisWindowOf,
  fitPose,
  lookingFrom,
  mixPoses,
  orbited,
  panned,
  sideOnPose,
  turned,
  zoomed,
} from '../../../renderer/cone/geometry/poses.ts';
import { prepareField } from '../../../renderer/cone/geometry/preparedField.ts';
import {
  clipMatrix,
  compose,
  modelMatrix,
  type Pose,
  pixelMatrix,
  project,
} from '../../../renderer/cone/geometry/projection.ts';
import { cross, direction, dot, type Frame, norm, subtract } from '../../../renderer/cone/geometry/vector.ts';
import { boxRing, capRing } from './skies.ts';

const VIEWPORT = { widthPx: 1280, heightPx: 500 };
const INSETS = { leftPx: 56, rightPx: 28 };

function expectRightHanded(frame: Frame): void {
  for (const [i, a] of frame.entries()) {
    for (const [j, b] of frame.entries()) expect(dot(a, b)).toBeCloseTo(i === j ? 1 : 0, 12);
  }
  expect(norm(subtract(cross(frame[0], frame[1]), frame[2]))).toBeLessThan(1e-12);
}

describe("a field's frame", () => {
  it.each([
    [0, 0, 90],
    [160, 4, 90],
    [34, -5, 20],
    [270, 62, 137],
    [10, 90, 0],
  ])('at %d, %d with its long axis at %d is right-handed and looks at the field', (ra, dec, angle) => {
    const frame = fieldFrame(ra, dec, angle);
    expectRightHanded(frame);
    expect(norm(subtract(frame[0], direction(ra, dec)))).toBeLessThan(1e-12);
  });

  it('counts position angles from north through east', () => {
    const north = fieldFrame(100, 20, 0)[1];
    expect(dot(north, direction(100, 21))).toBeGreaterThan(0.01);
    const east = fieldFrame(100, 20, 90)[1];
    expect(dot(east, direction(101, 20))).toBeGreaterThan(0.01);
    expect(Math.abs(dot(east, direction(100, 21)))).toBeLessThan(1e-12);
  });

  it('knows how far the field reaches', () => {
    const frame = fieldFrame(0, 0, 90);
    const corners = [direction(10, 0), direction(-10, 0), direction(0, 4), direction(0, -5)].flat();
    const extent = lateralExtent(frame, corners);
    expect(extent.alongMax).toBeCloseTo(Math.sin(Math.PI / 18), 12);
    expect(extent.alongMin).toBeCloseTo(-Math.sin(Math.PI / 18), 12);
    expect(extent.acrossMax).toBeCloseTo(Math.sin((4 * Math.PI) / 180), 12);
    expect(extent.acrossMin).toBeCloseTo(-Math.sin((5 * Math.PI) / 180), 12);
  });
});

describe('side-on', () => {
  it("puts the radial axis on the strip's pixels", () => {
    const pixels = pixelMatrix(sideOnPose(0.2, 0.9, VIEWPORT, INSETS, 0.05), VIEWPORT);
    expect(project(pixels, 0.2, 0.05, 0)![0]).toBeCloseTo(56, 9);
    expect(project(pixels, 0.9, 0.05, 0.3)![0]).toBeCloseTo(1280 - 28, 9);
    expect(project(pixels, 0.55, 0.05, 0)![0]).toBeCloseTo((56 + 1252) / 2, 9);
    expect(project(pixels, 0.55, 0.05, 0)![1]).toBeCloseTo(250, 9);
  });

  it('tells the window of the axis back', () => {
    const [min, max] = axisWindowOf(sideOnPose(0.2, 0.9, VIEWPORT, INSETS, 0), VIEWPORT, INSETS);
    expect(min).toBeCloseTo(0.2, 12);
    expect(max).toBeCloseTo(0.9, 12);
  });

  it('lifts and stretches a galaxy of the field across, and leaves its distance', () => {
    const model = modelMatrix(fieldFrame(160, 4, 90), 12, 0.3);
    const pixels = compose(pixelMatrix(sideOnPose(0, 1, VIEWPORT, INSETS, 0), VIEWPORT), model);
    const [x, y, z] = direction(160.5, 4);
    const scale = 1280 - 84;
    const place = project(pixels, x, y, z, 0.8)!;
    const along = 0.8 * Math.cos((4 * Math.PI) / 180) * Math.sin((0.5 * Math.PI) / 180);
    expect(place[0]).toBeCloseTo(56 + 0.8 * scale, 1);
    expect(place[1]).toBeCloseTo(250 - (12 * along + 0.3) * scale, 6);
  });
});

describe('a pose', () => {
  const pose: Pose = {
    axes: turned(-0.6, 0.4),
    target: [0.5, 0.1, -0.05],
    unitsPerPixel: 0.0015,
    perspective: 0.3,
  };

  it('has right-handed axes, however it is turned', () => {
    expectRightHanded(pose.axes);
    expectRightHanded(lookingFrom([0.3, -0.7, 0.5], [0, 0, 1]));
    let turning = pose;
    for (let i = 0; i < 500; i++) turning = orbited(turning, 0.03, Math.sin(i) * 0.05, [0, 1, 0]);
    expectRightHanded(turning.axes);
  });

  it('keeps the pixel under the pointer while zooming', () => {
    const flat = { ...pose, perspective: 0 };
    const before = pixelMatrix(flat, VIEWPORT);
    const after = pixelMatrix(zoomed(flat, 3, 900, 120, VIEWPORT), VIEWPORT);
    // A point of display space that is drawn at (900, 120).
    const shift = [(900 - 640) * 0.0015, -(120 - 250) * 0.0015] as const;
    const p = [0, 1, 2].map(
      (i) => flat.target[i]! + shift[0] * flat.axes[0][i]! + shift[1] * flat.axes[1][i]!,
    ) as [number, number, number];
    for (const matrix of [before, after]) {
      const [x, y] = project(matrix, ...p)!;
      expect(x).toBeCloseTo(900, 8);
      expect(y).toBeCloseTo(120, 8);
    }
  });

  it('moves with the hand', () => {
    const flat = { ...pose, perspective: 0 };
    const at = project(pixelMatrix(flat, VIEWPORT), 0.3, 0.2, 0.1)!;
    const moved = project(pixelMatrix(panned(flat, 40, -25), VIEWPORT), 0.3, 0.2, 0.1)!;
    expect(moved[0] - at[0]).toBeCloseTo(40, 8);
    expect(moved[1] - at[1]).toBeCloseTo(-25, 8);
  });

  it.each([0, 0.4])('fits points into the stage between the margins (perspective %d)', (perspective) => {
    const points = Float64Array.from([0, 0, 0, 1, 0.2, 0.1, 1, -0.2, 0.1, 0.9, 0.1, -0.3]);
    const margins = { left: 60, right: 40, top: 30, bottom: 70 };
    const fitted = fitPose({ ...pose, perspective }, points, VIEWPORT, margins);
    const matrix = pixelMatrix(fitted, VIEWPORT);
    const places = [0, 3, 6, 9].map((i) => project(matrix, points[i]!, points[i + 1]!, points[i + 2]!)!);
    const xs = places.map((p) => p[0]);
    const ys = places.map((p) => p[1]);
    // Repeated fitting of a perspective view settles to a pixel.
    expect(Math.min(...xs)).toBeGreaterThan(59);
    expect(Math.max(...xs)).toBeLessThan(1241);
    expect(Math.min(...ys)).toBeGreaterThan(29);
    expect(Math.max(...ys)).toBeLessThan(431);
    const full = Math.max(
      (Math.max(...xs) - Math.min(...xs)) / 1180,
      (Math.max(...ys) - Math.min(...ys)) / 400,
    );
    expect(full).toBeGreaterThan(0.99);
  });

  it('moves to another by a rotation, ends included', () => {
    const other: Pose = { axes: turned(2.2, -0.3), target: [0, 0, 0], unitsPerPixel: 0.006, perspective: 0 };
    expect(mixPoses(pose, other, 0)).toBe(pose);
    expect(mixPoses(pose, other, 1)).toBe(other);
    for (const t of [0.001, 0.3, 0.5, 0.999]) expectRightHanded(mixPoses(pose, other, t).axes);
    expect(mixPoses(pose, other, 0.5).unitsPerPixel).toBeCloseTo(0.003, 12);
    const nearly = mixPoses(pose, other, 1 - 1e-9).axes;
    for (const [i, axis] of nearly.entries()) expect(norm(subtract(axis, other.axes[i]!))).toBeLessThan(1e-6);
  });

  it('turns by half a turn too', () => {
    const front: Pose = { ...pose, axes: turned(0, 0) };
    const behind: Pose = { ...pose, axes: turned(Math.PI, 0) };
    const middle = mixPoses(front, behind, 0.5).axes;
    expectRightHanded(middle);
    expect(Math.abs(dot(middle[2], [0, 0, 1]))).toBeLessThan(1e-9);
  });

  it('draws in WebGL where it draws in pixels', () => {
    const pixels = pixelMatrix(pose, VIEWPORT);
    const clip = clipMatrix(pixels, VIEWPORT);
    for (const p of [
      [0.2, 0.1, 0],
      [0.9, -0.1, 0.3],
    ] as const) {
      const [x, y] = project(pixels, p[0], p[1], p[2])!;
      const c = [0, 1, 3].map(
        (row) => clip[row]! * p[0] + clip[4 + row]! * p[1] + clip[8 + row]! * p[2] + clip[12 + row]!,
      );
      // 32-bit matrices: pixels to a thousandth.
      expect((c[0]! / c[2]! + 1) * 640).toBeCloseTo(x, 3);
      expect((1 - c[1]! / c[2]!) * 250).toBeCloseTo(y, 3);
    }
  });

  it('draws nothing from behind the eye', () => {
    const pixels = pixelMatrix({ ...pose, axes: turned(0, 0), target: [0, 0, 0], perspective: 1 }, VIEWPORT);
    expect(project(pixels, 0, 0, 1.5)).toBeNull();
    expect(project(pixels, 0, 0, -3)).not.toBeNull();
  });
});

describe('the view that fits', () => {
  it('is side-on for a field, parallel for several, around the observer for a wide region or the whole sky', () => {
    expect(fittingView(1, false)).toBe('sideOn');
    expect(fittingView(3, false)).toBe('parallel');
    expect(fittingView(1, true)).toBe('aroundTheObserver');
    expect(fittingView(0, false)).toBe('aroundTheObserver');
  });

  it('says factors that are easily said', () => {
    expect(niceFactor(1)).toBe(1);
    expect(niceFactor(12.7)).toBe(12);
    expect(niceFactor(0.93)).toBe(0.9);
    expect(niceFactor(37)).toBe(30);
    expect(niceFactor(0.0312)).toBe(0.03);
  });

  it('proposes to open a needle, to keep a cone that fills the stage, and to press one that would not fit', () => {
    // 2 degrees over 1196 pixels of axis: 2 x 1196 x tan(1 deg) = 42 pixels high, where there is room for 380.
    expect(proposeSidewaysFactor(42, 380)).toBe(9);
    expect(proposeSidewaysFactor(300, 380)).toBe(1);
    expect(proposeSidewaysFactor(160, 380)).toBe(1);
    expect(proposeSidewaysFactor(415, 380)).toBe(0.9);
    expect(proposeSidewaysFactor(0, 380)).toBe(1);
  });

  it('never proposes a cone higher than its room', () => {
    for (let natural = 1; natural < 3000; natural *= 1.37) {
      expect(natural * proposeSidewaysFactor(natural, 380)).toBeLessThanOrEqual(380 * (1 + 1e-9));
    }
  });

  it('shares the room among lanes', () => {
    for (const natural of [[400, 20, 30], [10, 10], [900, 900, 900, 5], [50]]) {
      const heights = laneHeights(natural, 380);
      expect(heights.reduce((a, b) => a + b, 0)).toBeCloseTo(380, 9);
      expect(Math.min(...heights)).toBeGreaterThan(380 / natural.length / 2.51);
    }
  });

  it('lays parallel cones one above the other without overlap', () => {
    const fields = [
      {
        frame: fieldFrame(10, 0, 90),
        extent: { alongMin: -0.1, alongMax: 0.12, acrossMin: 0, acrossMax: 0 },
      },
      {
        frame: fieldFrame(60, 30, 0),
        extent: { alongMin: -0.02, alongMax: 0.02, acrossMin: 0, acrossMax: 0 },
      },
      {
        frame: fieldFrame(200, -40, 45),
        extent: { alongMin: -0.01, alongMax: 0.03, acrossMin: 0, acrossMax: 0 },
      },
    ];
    const factors = [1, 2, 3];
    const drawn = lanes('parallel', fields, 0, false, factors, [0.23, 0.1, 0.13]);
    expect(drawn.map((lane) => lane.field)).toEqual([0, 1, 2]);
    const reach = drawn.map((lane, i) => [
      lane.lift + fields[i]!.extent.alongMin * factors[i]!,
      lane.lift + fields[i]!.extent.alongMax * factors[i]!,
    ]);
    for (let i = 1; i < 3; i++) expect(reach[i]![1]!).toBeLessThan(reach[i - 1]![0]!);
  });

  it('shows one field side-on, and all in their true directions from the whole', () => {
    const fields = [0, 90].map((ra) => ({
      frame: fieldFrame(ra, 0, 90),
      extent: { alongMin: -0.1, alongMax: 0.1, acrossMin: 0, acrossMax: 0 },
    }));
    expect(lanes('sideOn', fields, 1, false, [1, 4], [1, 1])).toHaveLength(1);
    expect(lanes('sideOn', fields, 1, false, [1, 4], [1, 1])[0]!.sidewaysFactor).toBe(4);
    const whole = lanes('whole', fields, 0, false, [5, 4], [1, 1]);
    expect(whole.map((lane) => lane.sidewaysFactor)).toEqual([1, 1]);
    const p = project(
      compose(pixelMatrix(sideOnPose(-1, 1, VIEWPORT, INSETS, 0), VIEWPORT), whole[1]!.model),
      0,
      1,
      0,
    );
    // RA 90 is up, seen from the north.
    expect(p![1]).toBeLessThan(200);
  });
});

describe('a prepared field', () => {
  const field = (rings: ReturnType<typeof boxRing>[], radiusDeg: number, ra = 0, dec = 0) =>
    prepareField({ centreRaDeg: ra, centreDecDeg: dec, radiusDeg, positionAngleDeg: 90, rings });

  it('has the edges of its cone where the outline ends', () => {
    const box = field([boxRing(150, 170, -1, 9)], 11.2, 160, 4);
    expect(dot(box.upper, box.frame[0])).toBeCloseTo(Math.cos((10 * Math.PI) / 180), 3);
    expect(dot(box.upper, box.frame[1])).toBeGreaterThan(0.17);
    expect(dot(box.lower, box.frame[1])).toBeLessThan(-0.17);
    expect(box.corners).toHaveLength(4);
    expect(box.surrounds).toBe(false);
  });

  it('finds no corners in a round outline, but its extremes', () => {
    expect(field([capRing(20, 30, 5)], 5, 20, 30).corners).toHaveLength(4);
  });

  it('looks at the middle of a wide outline, and around where it lies on all sides', () => {
    const wide = field([boxRing(120, 240, -10, 40)], 180);
    expect(dot(wide.centre, direction(180, 20))).toBeGreaterThan(0.9);
    expect(wide.surrounds).toBe(false);
    const belt = field([capRing(0, 90, 70, true), capRing(0, -90, 70, true)], 180);
    expect(belt.surrounds).toBe(true);
    expect(field([], 180).surrounds).toBe(true);
  });

  it('stays looked at while its region is worked on; to look at it again changes no view', () => {
    const model = new ConeModel();
    const three = [20, 40, 60].map((ra) => field([capRing(ra, 30, 5)], 5, ra, 30));
    model.setFields(three, { fields: [], wide: false });
    model.setCurrent(0);
    expect(model.view).toBe('parallel');
    model.setCurrent(-1);
    expect([model.view, model.current]).toEqual(['sideOn', 2]);
    model.setFields([...three], { fields: [], wide: false });
    expect([model.view, model.current]).toEqual(['parallel', 2]);
    model.setCurrent(2);
    model.setFields(three.slice(0, 2), { fields: [], wide: false });
    expect(model.current).toBe(0);
    model.setFields([], { fields: [], wide: true });
    expect([model.view, model.current]).toEqual(['aroundTheObserver', 0]);
    // As a shape taken out, and back by an undo: the map and the sheet look at the third again.
    model.setFields(three, { fields: [], wide: false });
    expect(model.current).toBe(2);
  });

  it('is widened as it was asked for, also where that was before the region came, or was for another', () => {
    const model = new ConeModel();
    model.setViewport(VIEWPORT);
    model.setSidewaysFactor(7);
    const two = [20, 40].map((ra) => field([capRing(ra, 30, 1)], 1, ra, 30));
    for (const fields of [two.slice(1), two]) {
      model.setFields(fields, { fields: [], wide: false });
      expect(model.state().sidewaysFactor).toBe(7);
    }
    model.setCurrent(1);
    expect([model.view, model.state().sidewaysFactor]).toEqual(['sideOn', 7]);
    expect(model.state().caption.join(' ')).toContain('7');
    model.setSidewaysFactor(null);
    const proposed = model.state().sidewaysFactor;
    expect(proposed).not.toBe(7);
    model.setSidewaysFactor(proposed + 1);
    expect(model.state().sidewaysFactor).toBe(proposed + 1);
  });

  it('keeps north where it is on the sky', () => {
    for (const angle of [0, 30, 90, 137]) {
      const prepared = prepareField({
        centreRaDeg: 80,
        centreDecDeg: 20,
        radiusDeg: 2,
        positionAngleDeg: angle,
        rings: [capRing(80, 20, 2)],
      });
      const step = subtract(direction(80, 20.01), direction(80, 20));
      const along = dot(step, prepared.frame[1]) / norm(step);
      const across = dot(step, prepared.frame[2]) / norm(step);
      expect(prepared.north[1]).toBeCloseTo(along, 3);
      expect(prepared.north[2]).toBeCloseTo(across, 3);
    }
  });
});
