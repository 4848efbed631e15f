import { useEffect, useLayoutEffect, useRef } from 'preact/hooks';
import { useApp } from '../state/app.ts';
import type { Notice } from '../state/notices.ts';
import { IconButton } from '../ui/IconButton.tsx';
import { Offered } from './offered/Offered.tsx';
import './panels.css';
import './notices.css';

/** Facts go by themselves after this long, unless somebody is at them; problems stay until they are read. */
const FACT_STAYS_MS = 12_000;

/** Sentences for the person, at the foot of the window; and unsaved work from before, offered back. */
export function Notices() {
  const { notices, files } = useApp();
  const box = useRef<HTMLElement>(null);
  const cameFrom = useRef<EventTarget | null>(null);
  // A notice that goes takes its buttons along: the focus goes to the next one, or back to where it came from.
  useLayoutEffect(() => {
    if (cameFrom.current === null || document.activeElement !== document.body) return;
    const next = box.current?.querySelector('button') ?? cameFrom.current;
    if (next instanceof HTMLElement || next instanceof SVGElement) next.focus();
  }, [notices.list.value, files.offered.value]);
  return (
    <section
      ref={box}
      class="notices"
      aria-label="Notices"
      onFocusIn={({ relatedTarget }) => {
        if (relatedTarget !== null && !box.current?.contains(relatedTarget as Node))
          cameFrom.current = relatedTarget;
      }}
      onFocusOut={({ relatedTarget }) => {
        if (relatedTarget !== null && !box.current?.contains(relatedTarget as Node)) cameFrom.current = null;
      }}
    >
      <Offered />
      <div class="notice-live" role="log" aria-live="polite" aria-label="Messages">
        {notices.list.value.map((notice) => (
          <OneNotice key={notice.id} notice={notice} />
        ))}
      </div>
    </section>
  );
}

function OneNotice({ notice }: { readonly notice: Notice }) {
  const { notices } = useApp();
  const { id, tone, sentence, actions } = notice;
  useEffect(() => {
    if (tone !== 'fact' || actions.length > 0) return;
    let timer = setTimeout(go, FACT_STAYS_MS);
    function go(): void {
      const here = document.getElementById(`notice-${id}`);
      if (here?.matches(':hover, :focus-within')) timer = setTimeout(go, FACT_STAYS_MS);
      else notices.dismiss(id);
    }
    return () => clearTimeout(timer);
  }, [id]);
  return (
    <div id={`notice-${id}`} class={`notice notice-${tone}`}>
      <p>{sentence}</p>
      <div class="notice-actions">
        {actions.map(({ label, run }) => (
          <button
            key={label}
            type="button"
            class="button"
            onClick={() => {
              notices.dismiss(id);
              run();
            }}
          >
            {label}
          </button>
        ))}
        <IconButton icon="close" label="Dismiss" onClick={() => notices.dismiss(id)} />
      </div>
    </div>
  );
}
