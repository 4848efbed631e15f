import type { ComponentChildren, TargetedToggleEvent } from 'preact';
import { useId, useRef } from 'preact/hooks';
import { Icon } from './Icon.tsx';
import { placeUnder } from './placeUnder.ts';
import './ui.css';

export type MenuEntry =
  | {
      readonly kind: 'item';
      readonly label: string;
      /** Said beside the label: a key, a folder. */
      readonly hint?: string;
      readonly disabled?: boolean;
      readonly run: () => void;
    }
  | {
      readonly kind: 'group';
      readonly label: string;
      readonly entries: readonly Extract<MenuEntry, { kind: 'item' }>[];
    };

/** A button that opens a list of commands under it. Arrow keys walk, Escape closes, focus comes back to the button. */
export function Menu(props: {
  readonly label: string;
  readonly title?: string;
  readonly children?: ComponentChildren;
  readonly entries: readonly MenuEntry[];
  readonly disabled?: boolean;
  readonly buttonId?: string;
}) {
  const { label, title, children, entries, disabled = false, buttonId } = props;
  const id = useId();
  const list = useRef<HTMLDivElement>(null);
  const button = useRef<HTMLButtonElement>(null);
  const items = () => [
    ...(list.current?.querySelectorAll<HTMLButtonElement>('[role=menuitem]:not(:disabled)') ?? []),
  ];

  const onToggle = (event: TargetedToggleEvent<HTMLDivElement>): void => {
    const open = event.newState === 'open';
    button.current?.setAttribute('aria-expanded', String(open));
    if (!open) return;
    if (button.current !== null) placeUnder(button.current, event.currentTarget);
    items()[0]?.focus();
  };
  const onKeyDown = (event: KeyboardEvent): void => {
    const all = items();
    const at = all.indexOf(document.activeElement as HTMLButtonElement);
    const next = { ArrowDown: at + 1, ArrowUp: at - 1, Home: 0, End: all.length - 1 }[event.key];
    if (next !== undefined) {
      event.preventDefault();
      all.at(next % all.length)?.focus();
    } else if (event.key === 'Tab') list.current?.hidePopover();
    else if (event.key.length === 1 && /\S/.test(event.key)) {
      const typed = event.key.toLowerCase();
      const from = [...all.slice(at + 1), ...all.slice(0, at + 1)];
      from.find((item) => item.textContent?.trim().toLowerCase().startsWith(typed))?.focus();
    }
  };
  const item = (entry: Extract<MenuEntry, { kind: 'item' }>) => (
    <button
      key={entry.label + (entry.hint ?? '')}
      type="button"
      role="menuitem"
      tabIndex={-1}
      class="menu-item"
      disabled={entry.disabled ?? false}
      onClick={() => {
        list.current?.hidePopover();
        entry.run();
      }}
    >
      <span class="menu-text">{entry.label}</span>
      {entry.hint === undefined ? null : <span class="menu-hint">{entry.hint}</span>}
    </button>
  );
  return (
    <span class="menu">
      <button
        ref={button}
        type="button"
        class="button menu-button"
        aria-haspopup="menu"
        aria-expanded="false"
        aria-controls={id}
        popovertarget={id}
        disabled={disabled}
        {...(buttonId === undefined ? {} : { id: buttonId })}
        {...(title === undefined ? {} : { title })}
      >
        {children ?? label}
        <Icon name="down" />
      </button>
      <div
        ref={list}
        id={id}
        class="menu-list"
        role="menu"
        tabIndex={-1}
        aria-label={label}
        popover="auto"
        onToggle={onToggle}
        onKeyDown={onKeyDown}
      >
        {entries.map((entry) =>
          entry.kind === 'item' ? (
            item(entry)
          ) : (
            // biome-ignore lint/a11y/useSemanticElements: a fieldset has no place in a menu; the pattern is role group
            <div key={entry.label} role="group" aria-label={entry.label} class="menu-group">
              <div class="menu-heading" aria-hidden="true">
                {entry.label}
              </div>
              {entry.entries.map(item)}
            </div>
          ),
        )}
      </div>
    </span>
  );
}
