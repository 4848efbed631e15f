import { useId } from 'preact/hooks';
import { BenchField } from './BenchField.tsx';
import type { PictureChoices } from './pictureChoices.ts';

/** Title, caption and credit. Title and caption are offered until they are edited; emptied, they are left out. */
export function WordsChoice(props: {
  readonly choices: PictureChoices;
  readonly studyName: string;
  readonly offeredCaption: string;
  readonly onChange: (part: Partial<PictureChoices>) => void;
}) {
  const { choices, studyName, offeredCaption, onChange } = props;
  const id = useId();
  return (
    <>
      <BenchField
        label="Title"
        words
        value={choices.title ?? studyName}
        onInput={(title) => onChange({ title: title === studyName ? null : title })}
      />
      <div class="field">
        <label for={id}>Caption</label>
        <textarea
          id={id}
          rows={5}
          dir="auto"
          value={choices.caption ?? offeredCaption}
          onInput={(e) => onChange({ caption: e.currentTarget.value })}
        />
        {choices.caption === null ? (
          <p class="field-hint">Offered; it follows the study until you edit it.</p>
        ) : (
          <button type="button" class="link-button" onClick={() => onChange({ caption: null })}>
            Take the offered caption
          </button>
        )}
      </div>
      <BenchField label="Credit" words value={choices.credit} onInput={(credit) => onChange({ credit })} />
    </>
  );
}
