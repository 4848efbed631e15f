import type { ComponentChildren } from 'preact';
import { Icon } from './Icon.tsx';
import { sectionOpen, setSectionOpen } from './openSections.ts';
import './ui.css';

/** A part of a panel that folds away; folded, its heading still says the gist. */
export function Section(props: {
  readonly id: string;
  readonly title: string;
  /** The gist, shown beside the title. */
  readonly gist: string;
  /** Something here wants attention. */
  readonly alert?: boolean;
  readonly openAtFirst?: boolean;
  readonly children: ComponentChildren;
}) {
  const { id, title, gist, alert = false, openAtFirst = false, children } = props;
  const open = sectionOpen(id, openAtFirst).value;
  return (
    <section class="fold" aria-labelledby={`section-${id}`}>
      <h2 class="fold-title">
        <button
          type="button"
          id={`section-${id}`}
          class="fold-button"
          aria-expanded={open}
          aria-controls={`fold-${id}`}
          onClick={() => setSectionOpen(id, !open)}
        >
          <Icon name="after" />
          <span class="fold-name">{title}</span>
          <span class={alert ? 'fold-gist fold-alert' : 'fold-gist'}>{gist}</span>
        </button>
      </h2>
      <div id={`fold-${id}`} class="fold-body" hidden={!open}>
        {open ? children : null}
      </div>
    </section>
  );
}
