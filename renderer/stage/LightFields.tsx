import { roundTo } from '../../shared-core/base/roundTo.ts';
import { LIGHT_RANGES, type Light, STRETCHES, type Stretch } from '../../shared-core/study/schema.ts';
import { ChoiceField } from '../ui/ChoiceField.tsx';
import { SliderField } from '../ui/SliderField.tsx';

const STRETCH_WORDS: Readonly<Record<Stretch, string>> = {
  asinh: 'Asinh',
  logarithmic: 'Logarithmic',
  squareRoot: 'Square root',
  linear: 'Linear',
};

const percent = (share: number): string => `${Math.round(100 * share)} %`;
function stopsText(stops: number): string {
  return stops === 0 ? '0 stops' : `${stops > 0 ? '+' : '−'}${Math.abs(stops)} stops`;
}

/** How the galaxies' light is shown: on the stage, and in a picture. */
export function LightFields(props: {
  readonly light: Light;
  readonly onChange: (part: Partial<Light>) => void;
  /** The hand has let a slider go. */
  readonly onDone?: () => void;
}) {
  const { light, onChange, onDone } = props;
  const done = onDone === undefined ? {} : { onDone };
  return (
    <>
      <ChoiceField
        label="Stretch"
        value={light.stretch}
        choices={STRETCHES.map((value) => ({ value, label: STRETCH_WORDS[value] }))}
        onChoose={(stretch) => {
          onChange({ stretch: stretch as Stretch });
          onDone?.();
        }}
      />
      <SliderField
        label="Exposure"
        {...LIGHT_RANGES.exposureStops}
        step={0.25}
        value={light.exposureStops}
        words={stopsText(light.exposureStops)}
        onInput={(exposureStops) => onChange({ exposureStops })}
        {...done}
      />
      <SliderField
        label="Glow"
        {...LIGHT_RANGES.glow}
        step={0.05}
        value={light.glow}
        words={percent(light.glow)}
        onInput={(glow) => onChange({ glow })}
        {...done}
      />
      <SliderField
        label="Depth cue"
        {...LIGHT_RANGES.depthCue}
        step={0.05}
        value={light.depthCue}
        words={percent(light.depthCue)}
        onInput={(depthCue) => onChange({ depthCue })}
        {...done}
      />
      <SliderField
        label="Point size"
        // The slider of sizes runs evenly in octaves.
        min={Math.log2(LIGHT_RANGES.pointSize.min)}
        max={Math.log2(LIGHT_RANGES.pointSize.max)}
        step={0.25}
        value={Math.log2(light.pointSize)}
        words={`× ${roundTo(light.pointSize, 2)}`}
        onInput={(octaves) => onChange({ pointSize: 2 ** octaves })}
        {...done}
      />
    </>
  );
}
