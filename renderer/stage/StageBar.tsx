import type { ReadonlySignal } from '@preact/signals';
import { useId } from 'preact/hooks';
import { changeLook } from '../../shared-core/study/edits.ts';
import type { ViewState as ConeState } from '../cone/types.ts';
import { useApp } from '../state/app.ts';
import type { CameraView } from '../state/viewState.ts';
import { IconButton } from '../ui/IconButton.tsx';
import { Segments } from '../ui/Segments.tsx';
import { ColourSelect } from './ColourSelect.tsx';
import { type Colours, VIEW_NAMES } from './coneInputs.ts';
import { LightPopover } from './LightPopover.tsx';
import { SidewaysField } from './SidewaysField.tsx';
import { StageLegend } from './StageLegend.tsx';

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
/** The view that the cone is in; '' once it was orbited away from all of them. */
function shownView(state: ConeState | null): CameraView | '' {
  if (state === null) return 'side-on';
  if (!state.exact) return '';
  return VIEWS.find((v) => VIEW_NAMES[v.value] === state.view)?.value ?? '';
}

/** The controls of the cone: view, colour with its legend, field and widening. */
export function StageBar({
  coneState,
  colours,
}: {
  readonly coneState: ReadonlySignal<ConeState | null>;
  readonly colours: ReadonlySignal<Colours | null>;
}) {
  const { studyState, view } = useApp();
  const colourId = useId();
  const { look } = studyState.study.value;
  const fields = coneState.value?.fieldCount ?? 1;
  const stepField = (step: number): void => {
    // Side by side all fields are in view: stepping means looking at one.
    if (coneState.value?.view === 'parallel') view.lookFrom('side-on');
    view.field.value = (view.field.value + step) % fields;
  };
  return (
    <fieldset class="stage-bar">
      <legend class="unseen">How the cone is shown</legend>
      <Segments
        label="View"
        value={shownView(coneState.value) as CameraView}
        choices={VIEWS.filter((v) => v.needs === undefined || fields > 1)}
        onChoose={(value) => view.lookFrom(value)}
      />
      <span class="stage-colour">
        <label for={colourId}>colour</label>
        <ColourSelect
          id={colourId}
          value={look.colourBy}
          onChoose={(by) =>
            by === null ? undefined : studyState.perform(changeLook('Colour otherwise', { colourBy: by }))
          }
        />
      </span>
      <StageLegend colours={colours} />
      <LightPopover />
      {fields > 1 ? (
        <span class="stage-fields">
          <IconButton icon="before" label="Previous field" onClick={() => stepField(fields - 1)} />
          <span>
            field {(coneState.value?.field ?? 0) + 1} of {fields}
          </span>
          <IconButton icon="after" label="Next field" detail="F" onClick={() => stepField(1)} />
        </span>
      ) : null}
      <SidewaysField coneState={coneState} />
    </fieldset>
  );
}
