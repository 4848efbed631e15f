import { useId } from 'preact/hooks';
import './ui.css';

/** Something that is on or off. */
export function Switch(props: {
  readonly label: string;
  readonly checked: boolean;
  readonly onChange: (checked: boolean) => void;
}) {
  const id = useId();
  return (
    <span class="switch">
      <input
        id={id}
        type="checkbox"
        checked={props.checked}
        onChange={(e) => props.onChange(e.currentTarget.checked)}
      />
      <label for={id}>{props.label}</label>
    </span>
  );
}
