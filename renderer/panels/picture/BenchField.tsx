import { useId } from 'preact/hooks';
import type { Troubles } from './readChoices.ts';

/** A number or a word as it is typed; what is wrong with it is said once, below the whole row, by its field's name. */
export function BenchField(props: {
  readonly label: string;
  readonly unit?: string;
  readonly value: string;
  readonly field?: string;
  readonly troubles?: Troubles;
  readonly words?: boolean;
  readonly onInput: (text: string) => void;
}) {
  const { label, unit, value, field = '', troubles, words = false, onInput } = props;
  const id = useId();
  const trouble = field === '' ? undefined : troubles?.get(field);
  return (
    <div class="field">
      <label for={id}>{label}</label>
      <span class="field-box">
        <input
          id={id}
          type="text"
          inputMode={words ? 'text' : 'decimal'}
          dir="auto"
          autocomplete="off"
          spellcheck={words}
          value={value}
          aria-invalid={trouble !== undefined}
          {...(trouble === undefined ? {} : { 'aria-describedby': `${id}-note` })}
          onInput={(e) => onInput(e.currentTarget.value)}
        />
        {unit === undefined ? null : <span class="field-unit">{unit}</span>}
      </span>
      {trouble === undefined ? null : (
        <p class="field-trouble" id={`${id}-note`} role="alert">
          {trouble}
        </p>
      )}
    </div>
  );
}
