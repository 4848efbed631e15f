import { expect, it } from 'vitest';
import type { ColouringInput } from '../../../renderer/cone/types.ts';
import type { Selected } from '../../../renderer/engine/protocol.ts';
import { ownColouring } from '../../../renderer/stage/ownColouring.ts';

const galaxies = () => ({}) as Selected;
const values: ColouringInput = { kind: 'values', values: new Float32Array(2), from: 0, to: 1, map: 'heath' };

it('keeps the colours of the same galaxies until others are made, and never lends them to other galaxies', () => {
  const colouring = ownColouring();
  const [first, second] = [galaxies(), galaxies()];
  expect(colouring(first, values, 'heath')).toBe(values);
  // Another choice of colour is being made for the same galaxies.
  expect(colouring(first, null, 'heath')).toBeNull();
  // Other galaxies came, and their values are still read, or are not there: also with another map.
  expect(colouring(second, null, 'heath')).toEqual({ kind: 'radius', map: 'heath' });
  expect(colouring(second, null, 'slate')).toEqual({ kind: 'radius', map: 'slate' });
  expect(colouring(second, values, 'heath')).toBe(values);
  expect(colouring(second, null, 'heath')).toBeNull();
});
