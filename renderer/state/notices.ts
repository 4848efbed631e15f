import { type ReadonlySignal, signal } from '@preact/signals';

/** A sentence for the person, with what can be done about it. */
export interface Notice {
  readonly id: number;
  readonly sentence: string;
  readonly tone: 'problem' | 'fact';
  readonly actions: readonly { readonly label: string; readonly run: () => void }[];
}

/** Sentences shown until they are read; the same sentence stands only once. */
export interface Notices {
  readonly list: ReadonlySignal<readonly Notice[]>;
  tell(sentence: string, options?: { tone?: Notice['tone']; actions?: Notice['actions'] }): number;
  dismiss(id: number): void;
}

const MOST_AT_ONCE = 4;

export function createNotices(): Notices {
  const list = signal<readonly Notice[]>([]);
  let made = 0;
  return {
    list,
    tell(sentence, { tone = 'problem', actions = [] } = {}) {
      const notice = { id: ++made, sentence, tone, actions };
      list.value = [...list.value.filter((n) => n.sentence !== sentence), notice].slice(-MOST_AT_ONCE);
      return notice.id;
    },
    dismiss: (id) => void (list.value = list.value.filter((n) => n.id !== id)),
  };
}
