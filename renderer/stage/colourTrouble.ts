import type { ColourBy } from '../../shared-core/study/schema.ts';
import type { Selected } from '../engine/protocol.ts';
import type { EngineState } from '../state/engineState.ts';
import { colourWords } from './colourWords.ts';

/** That galaxies have not the colours that the study asks for, with the reason; null where they have or will have them. */
export function colourTrouble(
  by: ColourBy,
  selected: Selected | null,
  failure: EngineState['failure']['value'],
): string | null {
  if (selected === null) return null;
  const stage = typeof by === 'object' ? 'columns' : by;
  const why =
    by === 'magnitude' && selected.magnitude === null
      ? 'No column is chosen for it: choose one under Columns, or another colour.'
      : failure?.stage === stage
        ? failure.sentence
        : null;
  return why === null ? null : `Galaxies are not coloured by ${colourWords(by)}. ${why}`;
}
