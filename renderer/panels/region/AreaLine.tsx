import { formatNumber } from '../../../shared-core/report/quantity.ts';
import type { FootprintPicture } from '../../engine/protocol.ts';
import { useApp } from '../../state/app.ts';
import { regionFootprint } from '../regionReady.ts';
import { useStudyPart } from '../useStudyPart.ts';

type Area = Pick<FootprintPicture, 'areaDeg2' | 'estimate'>;

/** The area that the numbers stand on; null while there is neither a region nor a catalogue. */
function useArea(): Area | null {
  const region = useStudyPart('region');
  return useApp().engine.selected.value?.footprint ?? (region === null ? null : regionFootprint(region));
}

const exact = (deg2: number) => formatNumber(deg2, { significant: 7 });
const rough = (value: number, significant: number) => formatNumber(value, { significant });

/** The area in a few words. */
export function useAreaGist(): string {
  const area = useArea();
  if (area === null) return 'none';
  return area.estimate === null ? `${exact(area.areaDeg2)} deg²` : `≈ ${rough(area.areaDeg2, 4)} deg²`;
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
  const { areaDeg2, estimate } = area;
  if (estimate === null)
    return (
      <p class="area">
        <b>{exact(areaDeg2)}</b> deg² <span class="quiet">exact area</span>
      </p>
    );
  return (
    <>
      <p class="area">
        <b>
          {rough(areaDeg2, 4)} ± {rough(estimate.areaErrorDeg2, 2)}
        </b>{' '}
        deg² <span class="estimate-mark">estimate</span>
      </p>
      <p class="quiet">
        From {estimate.cells} occupied equal-area cells of {rough(estimate.cellAreaDeg2, 4)} deg² (HEALPix
        Nside {estimate.nside}). It is used as it is; a region makes it exact.
      </p>
    </>
  );
}
