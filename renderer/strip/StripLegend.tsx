import { useComputed } from '@preact/signals';
import { UNITS } from '../../shared-core/report/quantity.ts';
import { useApp } from '../state/app.ts';
import { P0_FIELD_ID, revealField } from '../ui/openSections.ts';
import { unitText } from '../ui/unitText.ts';
import { commonPower } from './densityScale.ts';
import { p0Texts } from './p0Text.ts';
import type { StripModel } from './stripModel.ts';
import { powerOfTen } from './words.ts';

/** The two scales in words: n at the left, n P0 at the right. */
export function StripLegend({ model }: { readonly model: StripModel }) {
  const { derived, studyState } = useApp();
  const perH3 = useComputed(() => studyState.study.value.p0Mpc3PerH3).value;
  const units = derived.units.value;
  const profile = model.profile.value;
  const density = model.density.value;
  const log = model.upward.value === 'log';
  const power = profile === null || density.upward === 'log' ? 0 : commonPower(density.high);
  const [perH, plain] = p0Texts(perH3, units);
  const counts = profile !== null && profile.power === null;
  return (
    <div class="strip-legend">
      <span class="strip-legend-left">
        <span class="strip-swatch strip-swatch-bar" aria-hidden="true" />
        {counts ? (
          <span>galaxies per bin; without an area there is no density</span>
        ) : (
          <span>
            n<span class="strip-wide"> of each bin</span>, {power === 0 ? '' : `${powerOfTen(power)} `}
            {unitText(UNITS.perMpc3.plain[units.perH ? 1 : 0])}
          </span>
        )}
        {profile !== null && !profile.hasCurve ? null : (
          <>
            <span class="strip-swatch strip-swatch-line" aria-hidden="true" />
            <span>smoothed</span>
            <span class="strip-swatch strip-swatch-strong" aria-hidden="true" />
            <span>
              <span class="strip-wide">where </span>nP₀ &gt; 1
            </span>
          </>
        )}
      </span>
      <button
        type="button"
        class="button strip-log"
        aria-pressed={log}
        title={log ? 'Density is read by powers of ten' : 'Density is read evenly'}
        onClick={() => void (model.chosenUpward.value = log ? 'linear' : 'log')}
      >
        log
      </button>
      {counts ? null : (
        <span class="strip-legend-right">
          nP₀, <span class="strip-wide">with </span>
          <button
            type="button"
            class="link-button strip-p0"
            title="The power at which effective volume and redshift are taken: press to set it"
            onClick={() => revealField('cosmology', P0_FIELD_ID)}
          >
            P₀ = {perH} = {plain}
          </button>
        </span>
      )}
    </div>
  );
}
