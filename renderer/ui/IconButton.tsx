import { Icon, type IconName } from './Icon.tsx';
import './ui.css';

/** A button with a drawing only: `label` is what it is called, `detail` what its tooltip adds. */
export function IconButton(props: {
  readonly icon: IconName;
  readonly label: string;
  readonly detail?: string;
  readonly disabled?: boolean;
  readonly pressed?: boolean;
  readonly onClick: () => void;
}) {
  const { icon, label, detail, disabled = false, pressed, onClick } = props;
  return (
    <button
      type="button"
      class="button icon-button"
      aria-label={label}
      title={detail === undefined ? label : `${label} (${detail})`}
      disabled={disabled}
      {...(pressed === undefined ? {} : { 'aria-pressed': pressed })}
      onClick={onClick}
    >
      <Icon name={icon} />
    </button>
  );
}
