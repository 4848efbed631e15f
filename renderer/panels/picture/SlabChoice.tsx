import { ChoiceField } from '../../ui/ChoiceField.tsx';
import { BenchField } from './BenchField.tsx';
import type { PictureChoices, SlabKind } from './pictureChoices.ts';
import type { Troubles } from './readChoices.ts';

type SlabNumber = 'decMinDeg' | 'decMaxDeg' | 'poleRaDeg' | 'poleDecDeg' | 'thicknessDeg';

const FIELDS: Readonly<Record<SlabKind, readonly (readonly [SlabNumber, string])[]>> = {
  offered: [],
  declination: [
    ['decMinDeg', 'Lowest Dec'],
    ['decMaxDeg', 'Highest Dec'],
  ],
  greatCircle: [
    ['poleRaDeg', 'RA of pole'],
    ['poleDecDeg', 'Dec of pole'],
    ['thicknessDeg', 'Thickness'],
  ],
};

/** What part of the sky a wedge lays flat. */
export function SlabChoice(props: {
  readonly choices: PictureChoices;
  readonly troubles: Troubles;
  readonly onChange: (part: Partial<PictureChoices>) => void;
}) {
  const { choices, troubles, onChange } = props;
  if (choices.what === 'film' || choices.view !== 'wedge') return null;
  return (
    <>
      <ChoiceField
        label="Slab of the wedge"
        value={choices.slab}
        choices={[
          { value: 'offered', label: 'Where the galaxies are' },
          { value: 'declination', label: 'Between two declinations' },
          { value: 'greatCircle', label: 'Along a great circle' },
        ]}
        onChoose={(slab) => onChange({ slab: slab as SlabKind })}
      />
      <div class="bench-row">
        {FIELDS[choices.slab].map(([field, label]) => (
          <BenchField
            key={field}
            label={label}
            unit="deg"
            value={choices[field]}
            field={field}
            troubles={troubles}
            onInput={(text) => onChange({ [field]: text })}
          />
        ))}
      </div>
    </>
  );
}
