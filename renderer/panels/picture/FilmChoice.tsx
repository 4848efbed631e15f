import { ChoiceField } from '../../ui/ChoiceField.tsx';
import { BenchField } from './BenchField.tsx';
import { OwnSize } from './OwnSize.tsx';
import { FILM_KIND_CHOICES, FILM_SIZE_CHOICES, type PictureChoices } from './pictureChoices.ts';
import type { Troubles } from './readChoices.ts';

const FILM_WORDS: Readonly<Record<PictureChoices['filmKind'], string>> = {
  turntable: 'Each cone turns once about its line of sight, and the film repeats without a halt.',
  'fly-along': 'The camera flies from the observer outward along the line of sight.',
  'shell-by-shell': 'Each shell is lit in turn with its numbers.',
};

/** What happens in a film, how long and how large. */
export function FilmChoice(props: {
  readonly choices: PictureChoices;
  readonly troubles: Troubles;
  /** Names of the fields that a fly-along can go through. */
  readonly fields: readonly string[];
  readonly onChange: (part: Partial<PictureChoices>) => void;
}) {
  const { choices, troubles, fields, onChange } = props;
  return (
    <>
      <ChoiceField
        label="Kind"
        value={choices.filmKind}
        choices={FILM_KIND_CHOICES}
        onChoose={(kind) => onChange({ filmKind: kind as PictureChoices['filmKind'] })}
      />
      <p class="field-hint">{FILM_WORDS[choices.filmKind]}</p>
      {choices.filmKind === 'fly-along' && fields.length > 1 ? (
        <ChoiceField
          label="Through"
          value={String(Math.min(choices.field, fields.length))}
          choices={fields.map((label, i) => ({ value: String(i + 1), label }))}
          onChoose={(field) => onChange({ field: Number(field) })}
        />
      ) : null}
      <div class="bench-row">
        <BenchField
          label="Length"
          unit="s"
          value={choices.seconds}
          field="seconds"
          troubles={troubles}
          onInput={(seconds) => onChange({ seconds })}
        />
        <BenchField
          label="Frames"
          unit="per s"
          value={choices.framesPerSecond}
          field="framesPerSecond"
          troubles={troubles}
          onInput={(framesPerSecond) => onChange({ framesPerSecond })}
        />
      </div>
      <ChoiceField
        label="Size"
        value={choices.filmSize}
        choices={FILM_SIZE_CHOICES}
        onChoose={(filmSize) => onChange({ filmSize })}
      />
      {choices.filmSize === 'own' ? (
        <OwnSize choices={choices} troubles={troubles} onChange={onChange} />
      ) : null}
    </>
  );
}
