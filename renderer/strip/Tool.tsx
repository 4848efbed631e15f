import { StripIcon, type StripIconName } from './StripIcon.tsx';

/** A button with a drawing, and with its words where the strip is wide enough. */
export function Tool(props: {
  readonly icon: StripIconName;
  readonly label: string;
  readonly detail?: string;
  readonly pressed?: boolean;
  readonly disabled?: boolean;
  readonly onClick: () => void;
}) {
  const { icon, label, detail, pressed, disabled = false, onClick } = props;
  return (
    <button
      type="button"
      class="button strip-tool"
      aria-label={label}
      title={detail === undefined ? label : `${label}: ${detail}`}
      disabled={disabled}
      {...(pressed === undefined ? {} : { 'aria-pressed': pressed })}
      onClick={onClick}
    >
      <StripIcon name={icon} />
      <span class="strip-wide" aria-hidden="true">
        {label}
      </span>
    </button>
  );
}
