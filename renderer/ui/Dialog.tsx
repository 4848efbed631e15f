import type { ComponentChildren } from 'preact';
import { useId, useLayoutEffect, useRef } from 'preact/hooks';
import { IconButton } from './IconButton.tsx';
import './ui.css';

/** A window over the window. The rest waits; Escape closes it, and focus goes back to where it came from. */
export function Dialog(props: {
  readonly title: string;
  readonly kind?: 'small' | 'middle' | 'wide' | 'offered';
  readonly onClose: () => void;
  /** Absent: a cross at the top closes. */
  readonly closeButton?: boolean;
  /** Whether a click beside the dialog closes it. */
  readonly lightDismiss?: boolean;
  readonly children: ComponentChildren;
}) {
  const { title, kind = 'small', onClose, closeButton = true, lightDismiss = true, children } = props;
  const ref = useRef<HTMLDialogElement>(null);
  const id = useId();
  useLayoutEffect(() => {
    const dialog = ref.current;
    dialog?.showModal();
    return () => dialog?.close();
  }, []);
  return (
    // biome-ignore lint/a11y/useKeyWithClickEvents: the click is on the backdrop; the key for it is Escape
    <dialog
      ref={ref}
      class={`dialog dialog-${kind}`}
      aria-labelledby={id}
      onCancel={(e) => {
        e.preventDefault();
        onClose();
      }}
      onClick={(e) => {
        if (lightDismiss && e.target === ref.current) onClose();
      }}
    >
      <div class="dialog-body">
        <div class="dialog-head">
          <h2 id={id}>{title}</h2>
          {closeButton ? <IconButton icon="close" label="Close" onClick={onClose} /> : null}
        </div>
        {children}
      </div>
    </dialog>
  );
}
