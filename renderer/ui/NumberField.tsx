import { useId, useState } from 'preact/hooks';
import { fieldText, readNumber } from './numberText.ts';
import './ui.css';

/**
 * A number with its name and unit. It is taken at Enter or when the field is left; Escape brings back what stood
 * there. What is refused stays in the field, with the reason under it.
 */
export function NumberField(props: {
  readonly label: string;
  /** Of the input, where something leads to it. */
  readonly inputId?: string;
  readonly unit?: string;
  readonly value: number | null;
  /** Whether the field may be empty; then `onCommit` gets null. */
  readonly optional?: boolean;
  readonly hint?: string;
  /** @returns why the number cannot be taken, or null when it was */
  readonly onCommit: (value: number | null) => string | null;
}) {
  const { label, unit, value, optional = false, hint, onCommit } = props;
  const made = useId();
  const id = props.inputId ?? made;
  const [draft, setDraft] = useState<{ text: string; of: number | null } | null>(null);
  const [trouble, setTrouble] = useState<{ sentence: string; of: number | null } | null>(null);
  // A draft belongs to the value it was typed over: undo, or another study, makes it stale.
  const text = draft !== null && Object.is(draft.of, value) ? draft.text : fieldText(value);
  const sentence = trouble !== null && Object.is(trouble.of, value) ? trouble.sentence : null;

  const commit = (): void => {
    if (text === fieldText(value)) {
      setDraft(null);
      setTrouble(null);
      return;
    }
    const read = optional && text.trim() === '' ? { value: null } : readNumber(text, label);
    const why = 'sentence' in read ? read.sentence : onCommit(read.value);
    setTrouble(why === null ? null : { sentence: why, of: value });
    if (why === null) setDraft(null);
  };
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
          value={text}
          aria-invalid={sentence !== null}
          {...(sentence !== null || hint !== undefined ? { 'aria-describedby': `${id}-note` } : {})}
          onInput={(e) => setDraft({ text: e.currentTarget.value, of: value })}
          onBlur={commit}
          onKeyDown={(e) => {
            if (e.key === 'Enter') commit();
            if (e.key === 'Escape' && draft !== null) {
              e.stopPropagation();
              e.preventDefault();
              setDraft(null);
              setTrouble(null);
            }
          }}
        />
        {unit === undefined || unit === '' ? null : <span class="field-unit">{unit}</span>}
      </span>
      {sentence !== null ? (
        <p class="field-trouble" id={`${id}-note`} role="alert">
          {sentence}
        </p>
      ) : hint !== undefined ? (
        <p class="field-hint" id={`${id}-note`}>
          {hint}
        </p>
      ) : null}
    </div>
  );
}
