import { useRef } from 'preact/hooks';
import { changeLook } from '../../shared-core/study/edits.ts';
import { type ColourMapName, type Light, USUAL_LIGHT } from '../../shared-core/study/schema.ts';
import { COLOUR_MAPS } from '../colour/colourMap.ts';
import { useApp } from '../state/app.ts';
import { ChoiceField } from '../ui/ChoiceField.tsx';
import { Popover } from '../ui/Popover.tsx';
import { LightFields } from './LightFields.tsx';

let gestures = 0;

/** Light and colours of the galaxies, kept in the study. */
export function LightPopover() {
  const { studyState } = useApp();
  const { look } = studyState.study.value;
  // All steps of one slide are one step of undo.
  const gesture = useRef(0);
  const change = (part: Partial<Light>): void => {
    gesture.current ||= ++gestures;
    const light = { ...studyState.study.value.look.light, ...part };
    studyState.perform({
      ...changeLook('Change the light', { light }),
      merge: `light ${Object.keys(part).join()} ${gesture.current}`,
    });
  };
  const usual = Object.entries(USUAL_LIGHT).every(([key, value]) => look.light[key as keyof Light] === value);
  return (
    <Popover label="Light" title="Stretch, exposure, glow, depth cue, point size and colours">
      {() => (
        <>
          <ChoiceField
            label="Colours"
            value={look.colourMap}
            choices={COLOUR_MAPS.map(({ name, title }) => ({ value: name, label: title }))}
            onChoose={(name) =>
              studyState.perform(changeLook('Take other colours', { colourMap: name as ColourMapName }))
            }
          />
          <LightFields light={look.light} onChange={change} onDone={() => (gesture.current = 0)} />
          <button
            type="button"
            class="link-button"
            disabled={usual}
            onClick={() => studyState.perform(changeLook('Take the usual light', { light: USUAL_LIGHT }))}
          >
            Take the usual light
          </button>
        </>
      )}
    </Popover>
  );
}
