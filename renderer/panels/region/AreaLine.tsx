import { areaText, estimateWords } from '../../../shared-core/report/areaWords.ts';
import type { FootprintPicture } from '../../engine/protocol.ts';
import { useApp } from '../../state/app.ts';
import { unitText } from '../../ui/unitText.ts';

/** The area that the numbers stand on; null while there is neither a region nor a catalogue. */
const useArea = (): FootprintPicture | null => useApp().engine.footprint.value;

/** The area in a few words. */
export function useAreaGist(): string {
  const area = useArea();
  if (area === null) return 'none';
  return `${area.estimate === null ? '' : '≈ '}${areaText(area).value} deg²`;
}

/** The area with all that a reader must know of it: exact, or an estimate with its cells and error. */
export function AreaLine() {
  const area = useArea();
  if (area === null)
    return (
      <p class="quiet">
        No region, and no catalogue to estimate one from. Add the shapes of the observed sky; without them
        shells have no volume.
      </p>
    );
  const { estimate } = area;
  const { value, error } = areaText(area);
  if (estimate === null)
    return (
      <p class="area">
        <b>{value}</b> deg² <span class="quiet">exact area</span>
      </p>
    );
  return (
    <>
      <p class="area">
        <b>
          {value} ± {error}
        </b>{' '}
        deg² <span class="estimate-mark">estimate</span>
      </p>
      <p class="quiet">
        An estimate {unitText(estimateWords(estimate))}. It is used as it is; a region makes it exact.
      </p>
    </>
  );
}
