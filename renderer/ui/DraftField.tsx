import { useId } from 'preact/hooks';
import './ui.css';

/** A text of a form that is taken as a whole, with what is wrong with it under it. */
export function DraftField(props: {
  readonly label: string;
  readonly unit?: string;
  readonly value: string;
  readonly trouble?: string | null;
  readonly onInput: (text: string) => void;
}) {
  const { label, unit, value, trouble = null, onInput } = props;
  const id = useId();
  return (
    <div class="field">
      <label for={id}>{label}</label>
      <span class="field-box">
        <input
          id={id}
          type="text"
          inputMode="decimal"
          autocomplete="off"
          spellcheck={false}
          value={value}
          aria-invalid={trouble !== null}
          {...(trouble === null ? {} : { 'aria-describedby': `${id}-note` })}
          onInput={(e) => onInput(e.currentTarget.value)}
        />
        {unit === undefined ? null : <span class="field-unit">{unit}</span>}
      </span>
      {trouble === null ? null : (
        <p class="field-trouble" id={`${id}-note`} role="alert">
          {trouble}
        </p>
      )}
    </div>
  );
}
