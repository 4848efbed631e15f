import { useEffect, useId } from 'preact/hooks';
import type { ColourMapName } from '../../../shared-core/study/schema.ts';
import { COLOUR_MAPS } from '../../colour/colourMap.ts';
import { ColourSelect } from '../../stage/ColourSelect.tsx';
import { colourWords } from '../../stage/colourWords.ts';
import { LightFields } from '../../stage/LightFields.tsx';
import { useApp } from '../../state/app.ts';
import { ChoiceField } from '../../ui/ChoiceField.tsx';
import { Segments } from '../../ui/Segments.tsx';
import { Switch } from '../../ui/Switch.tsx';
import type { PictureChoices } from './pictureChoices.ts';

/** Style and light. */
export function LookChoice(props: {
  readonly choices: PictureChoices;
  readonly onChange: (part: Partial<PictureChoices>) => void;
}) {
  const { choices, onChange } = props;
  const { studyState, view } = useApp();
  const id = useId();
  const { look } = studyState.study.value;
  // What the picture is coloured by is made while the bench is open.
  useEffect(() => {
    view.pictureColour.value = choices.colourBy;
  }, [view, choices.colourBy]);
  useEffect(() => () => void (view.pictureColour.value = null), [view]);
  return (
    <>
      <Segments
        label="Style"
        value={choices.style}
        choices={[
          { value: 'dark', label: 'Dark' },
          { value: 'paper', label: 'Paper' },
        ]}
        onChoose={(style) => onChange({ style })}
      />
      <div class="field">
        <label for={id}>Colour by</label>
        <span class="field-box">
          <ColourSelect
            id={id}
            value={choices.colourBy}
            unsaid={`As the study: ${colourWords(look.colourBy)}`}
            onChoose={(colourBy) => onChange({ colourBy })}
          />
        </span>
      </div>
      <ChoiceField
        label="Colours"
        value={choices.colourMap ?? ''}
        choices={[
          { value: '', label: `As the study: ${look.colourMap}` },
          ...COLOUR_MAPS.map(({ name, title }) => ({ value: name, label: title })),
        ]}
        onChoose={(name) => onChange({ colourMap: name === '' ? null : (name as ColourMapName) })}
      />
      <LightFields
        light={{ ...look.light, ...choices.light }}
        onChange={(part) => onChange({ light: { ...choices.light, ...part } })}
      />
      {Object.keys(choices.light).length === 0 ? (
        <p class="field-hint">The light is the study's until you change it.</p>
      ) : (
        <button type="button" class="link-button" onClick={() => onChange({ light: {} })}>
          Take the study's light
        </button>
      )}
      <div class="bench-switches">
        <Switch label="Rulers" checked={choices.rulers} onChange={(rulers) => onChange({ rulers })} />
        <Switch label="Shells" checked={choices.shells} onChange={(shells) => onChange({ shells })} />
        {choices.what === 'film' ? null : (
          <Switch
            label="Transparent ground"
            checked={choices.transparent}
            onChange={(transparent) => onChange({ transparent })}
          />
        )}
      </div>
    </>
  );
}
