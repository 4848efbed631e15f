import type { ComponentChildren, TargetedToggleEvent } from 'preact';
import { useId, useRef, useState } from 'preact/hooks';
import { Icon } from './Icon.tsx';
import { placeUnder } from './placeUnder.ts';
import './ui.css';

/** A button that opens a few controls under it. Escape and a click elsewhere close; focus comes back to the button. */
export function Popover(props: {
  readonly label: string;
  readonly title?: string;
  /** Made only while open. */
  readonly children: () => ComponentChildren;
}) {
  const { label, title, children } = props;
  const id = useId();
  const button = useRef<HTMLButtonElement>(null);
  const [open, setOpen] = useState(false);
  const onToggle = (event: TargetedToggleEvent<HTMLDivElement>): void => {
    const opened = event.newState === 'open';
    setOpen(opened);
    const panel = event.currentTarget;
    const place = (): void => {
      if (button.current !== null) placeUnder(button.current, panel);
    };
    if (!opened) return;
    place();
    // The content is there after the next drawing: then its size is known, and its first control can be focused.
    requestAnimationFrame(() => {
      place();
      panel.querySelector<HTMLElement>('select, input, button')?.focus();
    });
  };
  return (
    <span class="menu">
      <button
        ref={button}
        type="button"
        class="button menu-button"
        aria-haspopup="dialog"
        aria-expanded={open}
        aria-controls={id}
        popovertarget={id}
        {...(title === undefined ? {} : { title })}
      >
        {label}
        <Icon name="down" />
      </button>
      <div id={id} class="popover" role="dialog" aria-label={label} popover="auto" onToggle={onToggle}>
        {open ? children() : null}
      </div>
    </span>
  );
}
