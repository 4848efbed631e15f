import { useId } from 'preact/hooks';
import './ui.css';

/** A number that is found by looking: a slider with its name before and its words after it. */
export function SliderField(props: {
  readonly label: string;
  readonly value: number;
  readonly min: number;
  readonly max: number;
  readonly step: number;
  readonly words: string;
  readonly onInput: (value: number) => void;
  /** The hand has let go. */
  readonly onDone?: () => void;
}) {
  const { label, value, min, max, step, words, onInput, onDone } = props;
  const id = useId();
  return (
    <div class="slider-field">
      <label for={id}>{label}</label>
      <input
        id={id}
        type="range"
        min={min}
        max={max}
        step={step}
        value={value}
        aria-valuetext={words}
        onInput={(e) => onInput(Number(e.currentTarget.value))}
        {...(onDone === undefined ? {} : { onChange: onDone })}
      />
      <span>{words}</span>
    </div>
  );
}
