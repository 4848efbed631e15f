import { useSignal } from '@preact/signals';
import { useId } from 'preact/hooks';
import { useApp } from '../state/app.ts';
import { NOTHING_TYPED } from '../state/viewState.ts';
import { readNumber } from '../ui/numberText.ts';
import {
  DIVIDING_SCHEMES,
  type DividingScheme,
  divideShells,
  fieldRedshift,
  rangeInNumbers,
  rangeToDivide,
  shortRedshift,
  typedRange,
} from './schemes.ts';
import { standingShell } from './shellActions.ts';
import type { StripModel } from './stripModel.ts';
import { Tool } from './Tool.tsx';

const DEFAULT_SHELLS = 5;
const FIELDS = ['count', 'from', 'to'] as const;
type Field = (typeof FIELDS)[number];
/** Why nothing was laid out, and the fields that are to be mended. */
interface Trouble {
  readonly sentence: string;
  readonly at: readonly Field[];
}
/** Where a person is taken to choose a scheme. */
export const FIRST_SCHEME_ID = 'first-scheme';

/** How many shells, in what range, equal in what: lays the shells out anew. */
export function Divide({ model }: { readonly model: StripModel }) {
  const id = useId();
  const { studyState, derived, view } = useApp();
  const { edges } = studyState.study.value;
  const present = Math.max(0, edges.length - 1);
  /** What was typed, while it was typed over this number of shells. */
  const typed = useSignal<{ readonly text: string; readonly over: number } | null>(null);
  const wholeSample = useSignal(false);
  /** Why nothing was laid out, while that stands. */
  const trouble = useSignal<Trouble | null>(null);
  const sample = derived.sample.value;
  const text = typed.value?.over === present ? typed.value.text : String(present || DEFAULT_SHELLS);
  const untyped = rangeToDivide(edges, sample.count, wholeSample.value, model.window.value);
  const ends = rangeInNumbers(untyped, sample);

  const asked = () => {
    const count = readNumber(text, 'The number of shells');
    if ('sentence' in count) return { ...count, at: ['count' as const] };
    const range = typedRange(view.typedRange.peek(), untyped, sample);
    return 'sentence' in range ? range : { shells: count.value, range };
  };
  const judge = (): void => {
    const found = asked();
    trouble.value = 'sentence' in found ? found : null;
  };
  const divide = (kind: DividingScheme): void => {
    const found = asked();
    trouble.value = 'sentence' in found ? found : null;
    if ('sentence' in found) return;
    const edit = divideShells(kind, found.shells, found.range, sample, derived.cosmology.value);
    // A refusal belongs beside the fields that caused it, not among the notices.
    const refused = (sentence: string): void => void (trouble.value = { sentence, at: FIELDS });
    if (!studyState.perform(edit, refused)) return;
    // From now on the range is that of the edges.
    view.typedRange.value = NOTHING_TYPED;
    view.selectedShell.value = standingShell(studyState.study.peek().edges, view.selectedShell.peek());
  };
  const hasChoice = present > 0 && sample.count > 0;
  const described = (field: Field) =>
    trouble.value?.at.includes(field) ? { 'aria-describedby': `${id}-trouble` } : {};
  const end = (which: 'from' | 'to', label: string) => (
    <input
      class="strip-number strip-end"
      type="text"
      inputMode="decimal"
      autocomplete="off"
      spellcheck={false}
      aria-label={label}
      title={`${label}; empty for where they ${which === 'from' ? 'begin' : 'end'} now${ends[which] === null ? '' : `: ${shortRedshift(ends[which])}`}`}
      placeholder={ends[which] === null ? '' : fieldRedshift(ends[which])}
      value={view.typedRange.value[which]}
      {...described(which)}
      onInput={(event) => {
        view.typedRange.value = { ...view.typedRange.value, [which]: event.currentTarget.value };
        trouble.value = null;
      }}
      onBlur={judge}
      onKeyDown={(event) => {
        if (event.key === 'Enter') judge();
      }}
    />
  );
  return (
    // biome-ignore lint/a11y/useSemanticElements: a fieldset would bring its own box and legend into the row
    <div class="strip-group strip-divide" role="group" aria-label="Lay the shells out anew">
      <input
        class="strip-number"
        type="text"
        inputMode="numeric"
        autocomplete="off"
        aria-label="Number of shells"
        title="Number of shells"
        value={text}
        {...described('count')}
        onInput={(event) => {
          typed.value = { text: event.currentTarget.value, over: present };
          trouble.value = null;
        }}
        onKeyDown={(event) => {
          const by = { ArrowUp: 1, ArrowDown: -1 }[event.key];
          const now = Number(text);
          if (by === undefined || !Number.isInteger(now)) return;
          event.preventDefault();
          typed.value = { text: String(Math.max(1, now + by)), over: present };
        }}
      />
      <span>
        <span class="strip-wide">shells from </span>z
      </span>
      {end('from', 'Shells from redshift')}
      <span>
        <span class="strip-narrow">–</span>
        <span class="strip-wide">to</span>
      </span>
      {end('to', 'Shells up to redshift')}
      <span>
        <span class="strip-wide">of </span>equal
      </span>
      <span class="strip-schemes">
        {DIVIDING_SCHEMES.map(({ kind, label, words }, i) => (
          <button
            key={kind}
            {...(i === 0 ? { id: FIRST_SCHEME_ID } : {})}
            type="button"
            class="button"
            title={`Shells of equal ${words}`}
            aria-label={`${label}: shells of equal ${words}`}
            disabled={kind === 'count' && sample.count === 0}
            onClick={() => divide(kind)}
          >
            {label}
          </button>
        ))}
      </span>
      <Tool
        icon="all"
        label="Whole sample"
        detail={
          hasChoice
            ? 'an empty field takes the nearest or farthest galaxy, not the present edge'
            : 'needs galaxies and shells'
        }
        pressed={wholeSample.value}
        disabled={!hasChoice}
        onClick={() => void (wholeSample.value = !wholeSample.value)}
      />
      {trouble.value === null ? null : (
        <p id={`${id}-trouble`} class="strip-trouble" role="alert">
          {trouble.value.sentence}
        </p>
      )}
    </div>
  );
}
