import { useId } from 'preact/hooks';
import { COLOUR_CHOICES, type ColourChoice } from '../../../shared-core/study/schema.ts';
import { useApp } from '../../state/app.ts';
import { ChoiceField } from '../../ui/ChoiceField.tsx';
import { Segments } from '../../ui/Segments.tsx';
import { Switch } from '../../ui/Switch.tsx';
import type { PictureChoices } from './pictureChoices.ts';

const COLOUR_WORDS: Readonly<Record<ColourChoice, string>> = {
  redshift: 'Redshift',
  lookback: 'Lookback time',
  shell: 'Shell',
  magnitude: 'Magnitude',
  density: 'Local density',
};
const MOST_STOPS = 8;

/** Style and light. */
export function LookChoice(props: {
  readonly choices: PictureChoices;
  readonly onChange: (part: Partial<PictureChoices>) => void;
}) {
  const { choices, onChange } = props;
  const { engine, studyState } = useApp();
  const own = studyState.study.value.look.colourBy;
  const missing = (by: ColourChoice): string | null => {
    if (by === 'magnitude' && engine.selected.value?.magnitude == null) return 'no such column';
    if (by === 'density' && engine.density.value === null) return 'colour the cone by it first';
    return null;
  };
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
      <ChoiceField
        label="Colour by"
        value={choices.colourBy ?? ''}
        choices={[
          { value: '', label: `As the study: ${COLOUR_WORDS[own].toLowerCase()}` },
          ...COLOUR_CHOICES.map((by) => {
            const why = missing(by);
            return {
              value: by,
              label: why === null ? COLOUR_WORDS[by] : `${COLOUR_WORDS[by]} (${why})`,
              disabled: why !== null,
            };
          }),
        ]}
        onChoose={(by) => onChange({ colourBy: by === '' ? null : (by as ColourChoice) })}
      />
      <ChoiceField
        label="Stretch"
        value={choices.stretch}
        choices={[
          { value: 'asinh', label: 'Asinh' },
          { value: 'logarithmic', label: 'Logarithmic' },
          { value: 'squareRoot', label: 'Square root' },
          { value: 'linear', label: 'Linear' },
        ]}
        onChoose={(stretch) => onChange({ stretch: stretch as PictureChoices['stretch'] })}
      />
      <Exposure stops={choices.exposureStops} onChange={(exposureStops) => onChange({ exposureStops })} />
      <div class="bench-switches">
        <Switch label="Rulers" checked={choices.rulers} onChange={(rulers) => onChange({ rulers })} />
        <Switch label="Shells" checked={choices.shells} onChange={(shells) => onChange({ shells })} />
        <Switch
          label="Transparent ground"
          checked={choices.transparent}
          onChange={(transparent) => onChange({ transparent })}
        />
      </div>
    </>
  );
}

function Exposure({
  stops,
  onChange,
}: {
  readonly stops: number;
  readonly onChange: (stops: number) => void;
}) {
  const id = useId();
  const words = stops === 0 ? '0 stops' : `${stops > 0 ? '+' : '−'}${Math.abs(stops)} stops`;
  return (
    <div class="bench-exposure">
      <label for={id}>Exposure</label>
      <input
        id={id}
        type="range"
        min={-MOST_STOPS}
        max={MOST_STOPS}
        step={0.25}
        value={stops}
        aria-valuetext={words}
        onInput={(e) => onChange(Number(e.currentTarget.value))}
      />
      <span>{words}</span>
    </div>
  );
}
