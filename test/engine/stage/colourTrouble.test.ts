import { expect, it } from 'vitest';
import type { Selected } from '../../../renderer/engine/protocol.ts';
import { colourTrouble } from '../../../renderer/stage/colourTrouble.ts';

const selected = (magnitude: Float32Array | null) => ({ magnitude }) as Selected;
const failed = (stage: 'columns' | 'density' | 'load') => ({ stage, sentence: 'It holds no number.' });

it('says that galaxies have not the colours asked for, and why; not while they are still being made', () => {
  const [bright, dark] = [selected(new Float32Array(1)), selected(null)];
  expect(colourTrouble('magnitude', dark, null)).toBe(
    'Galaxies are not coloured by magnitude. No column is chosen for it: choose one under Columns, or another colour.',
  );
  expect(colourTrouble('magnitude', bright, null)).toBeNull();
  expect(colourTrouble({ column: 'snr' }, dark, failed('columns'))).toBe(
    'Galaxies are not coloured by column snr. It holds no number.',
  );
  expect(colourTrouble('density', dark, failed('density'))).toMatch(
    /^Galaxies are not coloured by local density\. /,
  );
  // What failed is not theirs, or nothing has yet.
  expect(colourTrouble('redshift', dark, failed('columns'))).toBeNull();
  expect(colourTrouble({ column: 'snr' }, dark, failed('density'))).toBeNull();
  expect(colourTrouble({ column: 'snr' }, dark, null)).toBeNull();
  // Without galaxies nothing is coloured.
  expect(colourTrouble('magnitude', null, failed('load'))).toBeNull();
});
