import { useApp } from '../../state/app.ts';
import { IconButton } from '../../ui/IconButton.tsx';
import { BenchField } from './BenchField.tsx';
import { freshLabel } from './benchState.ts';
import type { LabelDraft, PictureChoices } from './pictureChoices.ts';
import type { Troubles } from './readChoices.ts';

/** Labels tied to places in the survey. */
export function LabelsChoice(props: {
  readonly labels: readonly LabelDraft[];
  readonly troubles: Troubles;
  readonly onChange: (part: Partial<PictureChoices>) => void;
}) {
  const { labels, troubles, onChange } = props;
  const app = useApp();
  const edit = (at: number, part: Partial<LabelDraft>): void =>
    onChange({ labels: labels.map((label, i) => (i === at ? { ...label, ...part } : label)) });
  return (
    <>
      {labels.map((label, i) => (
        <fieldset key={i} class="bench-label">
          <legend class="unseen">Label {i + 1}</legend>
          <div class="bench-label-text">
            <BenchField
              label={`Label ${i + 1}`}
              words
              value={label.text}
              field={`label${i}.text`}
              troubles={troubles}
              onInput={(text) => edit(i, { text })}
            />
            <IconButton
              icon="close"
              label={`Take label ${i + 1} away`}
              onClick={() => onChange({ labels: labels.filter((_, at) => at !== i) })}
            />
          </div>
          <div class="bench-row">
            <BenchField
              label="RA"
              unit="deg"
              value={label.raDeg}
              field={`label${i}.raDeg`}
              troubles={troubles}
              onInput={(raDeg) => edit(i, { raDeg })}
            />
            <BenchField
              label="Dec"
              unit="deg"
              value={label.decDeg}
              field={`label${i}.decDeg`}
              troubles={troubles}
              onInput={(decDeg) => edit(i, { decDeg })}
            />
            <BenchField
              label="z"
              value={label.redshift}
              field={`label${i}.redshift`}
              troubles={troubles}
              onInput={(redshift) => edit(i, { redshift })}
            />
          </div>
        </fieldset>
      ))}
      <button
        type="button"
        class="button bench-add"
        title="At the galaxy pointed at in the cone, if there is one"
        onClick={() => onChange({ labels: [...labels, freshLabel(app, labels.length)] })}
      >
        Add a label
      </button>
    </>
  );
}
