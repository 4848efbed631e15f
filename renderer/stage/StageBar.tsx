import type { ReadonlySignal } from '@preact/signals';
import { changeLook } from '../../shared-core/study/edits.ts';
import { COLOUR_CHOICES, type ColourChoice, type RadialReading } from '../../shared-core/study/schema.ts';
import type { ViewState as ConeState } from '../cone/types.ts';
import { useApp } from '../state/app.ts';
import type { CameraView } from '../state/viewState.ts';
import { IconButton } from '../ui/IconButton.tsx';
import { Segments } from '../ui/Segments.tsx';
import { SidewaysField } from './SidewaysField.tsx';

const VIEWS: readonly { value: CameraView; label: string; title: string; needs?: 'fields' }[] = [
  { value: 'side-on', label: 'Side-on', title: 'Radius to the right, aligned with the strip (1)' },
  { value: 'down-the-cone', label: 'Down', title: 'Down the cone, from the observer (2)' },
  { value: 'from-behind', label: 'Behind', title: 'From behind the deepest shell (3)' },
  { value: 'whole', label: 'Whole', title: 'Everything in its true direction (4)' },
  { value: 'around', label: 'Around', title: 'Around the observer, rulers as rings (5)' },
  {
    value: 'parallel',
    label: 'Parallel',
    title: 'All fields above one another on one axis (6)',
    needs: 'fields',
  },
];
const READINGS: readonly { value: RadialReading; label: string; title: string }[] = [
  { value: 'comoving', label: 'Mpc', title: 'Radius is comoving distance (R steps on)' },
  { value: 'redshift', label: 'z', title: 'Radius is redshift (R steps on)' },
  { value: 'lookback', label: 'Gyr', title: 'Radius is lookback time (R steps on)' },
];
const COLOUR_WORDS: Readonly<Record<ColourChoice, string>> = {
  redshift: 'redshift',
  lookback: 'lookback time',
  shell: 'shell',
  magnitude: 'magnitude',
  density: 'local density',
};

/** The controls of the cone: view, radius, colour, field and widening. */
export function StageBar({ coneState }: { readonly coneState: ReadonlySignal<ConeState | null> }) {
  const { studyState, view, engine } = useApp();
  const { look } = studyState.study.value;
  const fields = coneState.value?.fieldCount ?? 1;
  const hasMagnitude = engine.selected.value?.magnitude != null;
  return (
    <fieldset class="stage-bar">
      <legend class="unseen">How the cone is shown</legend>
      <Segments
        label="View"
        value={view.cameraView.value}
        choices={VIEWS.filter((v) => v.needs === undefined || fields > 1)}
        onChoose={(value) => view.lookFrom(value)}
      />
      <Segments
        label="Radius"
        value={look.radial}
        choices={READINGS}
        onChoose={(radial) => studyState.perform(changeLook('Read the radius otherwise', { radial }))}
      />
      <label class="stage-colour">
        <span>colour</span>
        <select
          value={look.colourBy}
          onChange={(e) =>
            studyState.perform(
              changeLook('Colour otherwise', { colourBy: e.currentTarget.value as ColourChoice }),
            )
          }
        >
          {COLOUR_CHOICES.map((choice) => (
            <option key={choice} value={choice} disabled={choice === 'magnitude' && !hasMagnitude}>
              {COLOUR_WORDS[choice]}
            </option>
          ))}
        </select>
      </label>
      {fields > 1 ? (
        <span class="stage-fields">
          <IconButton
            icon="before"
            label="Previous field"
            onClick={() => (view.field.value = (view.field.value + fields - 1) % fields)}
          />
          <span>
            field {(coneState.value?.field ?? 0) + 1} of {fields}
          </span>
          <IconButton
            icon="after"
            label="Next field"
            detail="F"
            onClick={() => (view.field.value = (view.field.value + 1) % fields)}
          />
        </span>
      ) : null}
      <SidewaysField coneState={coneState} />
    </fieldset>
  );
}
