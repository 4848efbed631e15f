import { type ReadonlySignal, signal } from '@preact/signals';

/** A question that stops everything else until it is answered. */
export interface Question {
  readonly title: string;
  readonly text: string;
  /** A text to be typed, with what stands in the field at first. */
  readonly field: { readonly label: string; readonly value: string } | null;
  /** The first is the safe one, the last the one that Enter takes. */
  readonly answers: readonly { readonly key: string; readonly label: string; readonly danger?: boolean }[];
}

/** Questions to the person, one at a time, each shown as a modal dialog. Escape takes the first answer. */
export interface Questions {
  readonly open: ReadonlySignal<Question | null>;
  answer(key: string, text: string): void;
  ask(question: Question): Promise<{ readonly key: string; readonly text: string }>;
  askLeave(name: string): Promise<'save' | 'leave' | 'stay'>;
  askReplace(sentence: string): Promise<'replace' | 'saveAs' | 'stay'>;
  /** `file` holds a study of another catalogue than the one that is open. */
  askOther(question: {
    readonly file: string;
    readonly catalogue: string;
  }): Promise<'replace' | 'saveAs' | 'stay'>;
  askSaveName(question: {
    readonly suggestedName: string;
    readonly folder: string;
    readonly problem: string | null;
  }): Promise<string | null>;
  askOverwrite(question: { readonly name: string; readonly folder: string }): Promise<boolean>;
}

export function createQuestions(): Questions {
  const waiting = signal<
    readonly { question: Question; resolve: (a: { key: string; text: string }) => void }[]
  >([]);
  const open = signal<Question | null>(null);
  const ask = (question: Question) =>
    new Promise<{ key: string; text: string }>((resolve) => {
      waiting.value = [...waiting.value, { question, resolve }];
      open.value = waiting.value[0]!.question;
    });
  return {
    open,
    answer(key, text) {
      const [first, ...rest] = waiting.value;
      waiting.value = rest;
      open.value = rest[0]?.question ?? null;
      first?.resolve({ key, text });
    },
    ask,
    async askLeave(name) {
      const { key } = await ask({
        title: `"${name}" has changes that are not saved`,
        text: 'Save them before you leave this study?',
        field: null,
        answers: [
          { key: 'stay', label: 'Stay' },
          { key: 'leave', label: 'Leave without saving', danger: true },
          { key: 'save', label: 'Save' },
        ],
      });
      return key as 'save' | 'leave' | 'stay';
    },
    async askReplace(sentence) {
      const { key } = await ask({
        title: 'The study was changed by somebody else',
        text: sentence,
        field: null,
        answers: [
          { key: 'stay', label: 'Not now' },
          { key: 'replace', label: 'Replace it with mine', danger: true },
          { key: 'saveAs', label: 'Save under another name' },
        ],
      });
      return key as 'replace' | 'saveAs' | 'stay';
    },
    async askOther({ file, catalogue }) {
      const { key } = await ask({
        title: `${file} holds a study of another catalogue`,
        text: `The study that is open now has ${catalogue}. Under a name of its own both are kept.`,
        field: null,
        answers: [
          { key: 'stay', label: 'Not now' },
          { key: 'replace', label: 'Replace it', danger: true },
          { key: 'saveAs', label: 'Save under a new name…' },
        ],
      });
      return key as 'replace' | 'saveAs' | 'stay';
    },
    async askSaveName({ suggestedName, folder, problem }) {
      const { key, text } = await ask({
        title: 'Save the study',
        text: `${problem === null ? '' : `${problem} `}Studies are saved in ${folder}.`,
        field: { label: 'Name', value: suggestedName },
        answers: [
          { key: 'stay', label: 'Not now' },
          { key: 'save', label: 'Save' },
        ],
      });
      return key === 'save' ? text : null;
    },
    async askOverwrite({ name, folder }) {
      const { key } = await ask({
        title: `${name} exists already`,
        text: `In ${folder}. Replace it?`,
        field: null,
        answers: [
          { key: 'stay', label: 'Keep the old file' },
          { key: 'replace', label: 'Replace', danger: true },
        ],
      });
      return key === 'replace';
    },
  };
}
