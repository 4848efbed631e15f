import { useId } from 'preact/hooks';
import './ui.css';

/** A few alternatives side by side, one of them chosen. */
export function Segments<T extends string>(props: {
  readonly label: string;
  readonly value: T;
  readonly choices: readonly { readonly value: T; readonly label: string; readonly title?: string }[];
  readonly disabled?: boolean;
  readonly onChoose: (value: T) => void;
}) {
  const { label, value, choices, disabled = false, onChoose } = props;
  const name = useId();
  return (
    <fieldset class="segments" disabled={disabled}>
      <legend class="unseen">{label}</legend>
      {choices.map((choice) => (
        <label
          key={choice.value}
          class="segment"
          {...(choice.title === undefined ? {} : { title: choice.title })}
        >
          <input
            type="radio"
            class="unseen"
            name={name}
            checked={choice.value === value}
            onChange={() => onChoose(choice.value)}
          />
          <span>{choice.label}</span>
        </label>
      ))}
    </fieldset>
  );
}
