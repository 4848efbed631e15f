import type { ColourMapName } from '../../shared-core/study/schema.ts';
import type { ColouringInput } from '../cone/types.ts';
import type { Selected } from '../engine/protocol.ts';

/**
 * What the cone's galaxies are to be coloured by, from one change to the next; null leaves the colours as they are.
 * While values of their own are being made, or cannot be, galaxies keep the colours that they had, but never take values
 * that belong to others: they are coloured by radius then.
 */
export function ownColouring(): (
  selected: Selected | null,
  made: ColouringInput | null,
  map: ColourMapName,
) => ColouringInput | null {
  let coloured: Selected | null = null;
  return (selected, made, map) => {
    if (made !== null) {
      coloured = selected;
      return made;
    }
    return selected === coloured ? null : { kind: 'radius', map };
  };
}
