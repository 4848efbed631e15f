import { ChoiceField } from '../../ui/ChoiceField.tsx';
import { Switch } from '../../ui/Switch.tsx';
import { BenchField } from './BenchField.tsx';
import { OwnSize } from './OwnSize.tsx';
import { isSheet, type PictureChoices, SIZE_CHOICES } from './pictureChoices.ts';
import type { Troubles } from './readChoices.ts';

/** How large: by name, as a sheet of paper, or by pixels. */
export function SizeChoice(props: {
  readonly choices: PictureChoices;
  readonly troubles: Troubles;
  readonly onChange: (part: Partial<PictureChoices>) => void;
}) {
  const { choices, troubles, onChange } = props;
  return (
    <>
      <ChoiceField
        label="Size"
        value={choices.size}
        choices={SIZE_CHOICES}
        onChoose={(size) => onChange({ size })}
      />
      {isSheet(choices.size) ? (
        <Switch
          label="Upright sheet"
          checked={choices.upright}
          onChange={(upright) => onChange({ upright })}
        />
      ) : null}
      {choices.size === 'own' ? (
        <OwnSize choices={choices} troubles={troubles} onChange={onChange}>
          <BenchField
            label="On paper"
            unit="dpi"
            value={choices.dpi}
            field="dpi"
            troubles={troubles}
            onInput={(dpi) => onChange({ dpi })}
          />
        </OwnSize>
      ) : null}
    </>
  );
}
