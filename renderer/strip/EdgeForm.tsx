import { signal } from '@preact/signals';
import { useId, useLayoutEffect, useRef, useState } from 'preact/hooks';
import { roundTo } from '../../shared-core/base/roundTo.ts';
import {
  addEdge,
  type Edit,
  edgesInTheWay,
  moveEdge,
  moveEdgeThrough,
} from '../../shared-core/study/edits.ts';
import { RADIAL_READINGS, type RadialReading } from '../../shared-core/study/schema.ts';
import { useApp } from '../state/app.ts';
import { NOTHING_TYPED } from '../state/viewState.ts';
import { focusSoon } from '../ui/focusSoon.ts';
import { fieldText } from '../ui/numberText.ts';
import { FIRST_SCHEME_ID } from './Divide.tsx';
import type { Readings } from './readings.ts';
import type { Typing } from './stripModel.ts';
import './edgeForm.css';
import { typedRedshift } from './typedRedshift.ts';

/** The unit that an edge was typed in last. */
const lastUnit = signal<RadialReading>('redshift');

/**
 * Takes an exact place for an edge, as redshift, lookback time or distance. What was typed is read in the unit that is
 * chosen then; a value that nobody touched is converted. A refusal stands under the field, with what can be done.
 */
export function EdgeForm(props: {
  readonly label: string;
  readonly typing: Typing;
  readonly readings: Readings;
  /** The unit to begin with; the one used last if not given. */
  readonly unit?: RadialReading;
  readonly inputId?: string;
  readonly takesFocus?: boolean;
  /** The edge stands there, or another way to put it there was taken. */
  readonly onDone: () => void;
}) {
  const { label, typing, readings, inputId, takesFocus = false, onDone } = props;
  const { studyState, view } = useApp();
  const made = useId();
  const id = inputId ?? made;
  const input = useRef<HTMLInputElement>(null);
  const [kind, setKind] = useState<RadialReading>(props.unit ?? lastUnit.peek());
  /** Null while nothing was typed. */
  const [typed, setTyped] = useState<string | null>(null);
  const [trouble, setTrouble] = useState<{ readonly sentence: string; readonly z: number | null } | null>(
    null,
  );
  const text = typed ?? untouchedText(typing.z, kind, readings);
  useLayoutEffect(() => {
    if (!takesFocus) return;
    input.current?.focus({ preventScroll: true });
    input.current?.select();
  }, []);

  const perform = (edit: Edit, z: number): void => {
    // The sentence stands under the field, not among the notices.
    if (!studyState.perform(edit, (sentence) => setTrouble({ sentence, z }))) return;
    setTrouble(null);
    lastUnit.value = kind;
    onDone();
  };
  const submit = (event: Event): void => {
    event.preventDefault();
    // A value that was not touched is the edge's own, not its few digits.
    if (typed === null && typing.kind === 'move') {
      onDone();
      return;
    }
    const read = typed === null ? { z: typing.z } : typedRedshift(typed, kind, readings);
    if ('sentence' in read) setTrouble({ sentence: read.sentence, z: null });
    else perform(typing.kind === 'move' ? moveEdge(typing.index, read.z) : addEdge(read.z), read.z);
  };
  const { edges } = studyState.study.value;
  const z = trouble?.z ?? null;
  const way = z === null || typing.kind === 'add' ? null : edgesInTheWay(edges, typing.index, z);
  return (
    <form class="edge-form" aria-label={label} onSubmit={submit}>
      <label for={id}>{label}</label>
      <input
        ref={input}
        id={id}
        type="text"
        inputMode="decimal"
        autocomplete="off"
        spellcheck={false}
        value={text}
        aria-invalid={trouble !== null}
        {...(trouble === null ? {} : { 'aria-describedby': `${id}-trouble` })}
        onInput={(event) => {
          setTyped(event.currentTarget.value);
          setTrouble(null);
        }}
      />
      <select
        aria-label="Read as"
        value={kind}
        onChange={(event) => {
          setKind(event.currentTarget.value as RadialReading);
          setTrouble(null);
        }}
      >
        {RADIAL_READINGS.map((one) => (
          <option key={one} value={one}>
            {readings[one].unit}
          </option>
        ))}
      </select>
      <button type="submit" class="button accent-button">
        {typing.kind === 'move' ? 'Move' : 'Add'}
      </button>
      {trouble === null ? null : (
        <p id={`${id}-trouble`} role="alert">
          {trouble.sentence}
        </p>
      )}
      {way === null || z === null || typing.kind === 'add' ? null : (
        <div class="edge-form-ways">
          <button type="button" class="button" onClick={() => perform(moveEdgeThrough(typing.index, z), z)}>
            {way[0] === way[1] ? `Remove edge ${way[0] + 1}` : `Remove edges ${way[0] + 1} to ${way[1] + 1}`}
            {' and move'}
          </button>
          {endOfAll(typing.index, edges.length, way[0] < typing.index) === null ? null : (
            <button
              type="button"
              class="button"
              onClick={() => {
                const end = endOfAll(typing.index, edges.length, way[0] < typing.index)!;
                view.typedRange.value = { ...NOTHING_TYPED, [end]: String(z) };
                onDone();
                focusSoon(FIRST_SCHEME_ID);
              }}
            >
              Lay out anew…
            </button>
          )}
        </div>
      )}
    </form>
  );
}

/** The end of the range that an edge stands for, when it moves inward from that end of all shells. */
function endOfAll(index: number, edges: number, back: boolean): 'from' | 'to' | null {
  if (back) return index === edges - 1 ? 'to' : null;
  return index === 0 ? 'from' : null;
}

/** An edge's own value in a unit, in the digits that a field has room for. */
export function untouchedText(z: number, kind: RadialReading, readings: Readings): string {
  return fieldText(roundTo(readings[kind].shownAt(z), 6));
}
