import { useId } from 'preact/hooks';
import './ui.css';

/** One of several, by name. */
export function ChoiceField(props: {
  readonly label: string;
  readonly value: string;
  readonly choices: readonly {
    readonly value: string;
    readonly label: string;
    readonly disabled?: boolean;
  }[];
  readonly disabled?: boolean;
  readonly onChoose: (value: string) => void;
}) {
  const { label, value, choices, disabled = false, onChoose } = props;
  const id = useId();
  return (
    <div class="field">
      <label for={id}>{label}</label>
      <span class="field-box">
        <select id={id} value={value} disabled={disabled} onChange={(e) => onChoose(e.currentTarget.value)}>
          {choices.map((choice) => (
            <option key={choice.value} value={choice.value} disabled={choice.disabled ?? false}>
              {choice.label}
            </option>
          ))}
        </select>
      </span>
    </div>
  );
}
