import { Refusal } from '../base/refusal.ts';
import { compileBox } from './box.ts';
import { compileCap } from './cap.ts';
import { compilePolygon } from './polygon.ts';
import type { SkyShape } from './region.ts';
import { type CompiledShape, SMALLEST_AREA_SR } from './shape.ts';

const WHOLE_SKY: CompiledShape = {
  arcs: [],
  areaSr: 4 * Math.PI,
  centre: [0, 0, 1],
  radiusRad: Math.PI,
  side: () => 1,
};

/**
 * One shape made ready: boundary arcs, exact area, point test.
 * @throws Refusal (kind 'use') for a shape that is none: see the compilers of each kind.
 */
export function compileShape(shape: SkyShape): CompiledShape {
  const compiled = compileKind(shape);
  if (compiled.areaSr < SMALLEST_AREA_SR) {
    throw new Refusal(
      `The ${shape.kind} is smaller than a tenth of an arcsecond across, which is no region to observe: give its size in degrees.`,
      'use',
    );
  }
  return compiled;
}

function compileKind(shape: SkyShape): CompiledShape {
  switch (shape.kind) {
    case 'wholeSky':
      return WHOLE_SKY;
    case 'box':
      return compileBox(shape);
    case 'cap':
      return compileCap(shape);
    case 'polygon':
      return compilePolygon(shape);
  }
}
