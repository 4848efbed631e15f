import { useId, useLayoutEffect, useRef, useState } from 'preact/hooks';
import { Refusal } from '../../shared-core/base/refusal.ts';
import { DEEPEST_REDSHIFT } from '../../shared-core/shells/edges.ts';
import { addEdge, type Edit, moveEdge } from '../../shared-core/study/edits.ts';
import { RADIAL_READINGS, type RadialReading } from '../../shared-core/study/schema.ts';
import { useApp } from '../state/app.ts';
import { fieldText, readNumber } from '../ui/numberText.ts';
import { markText } from './axisMarks.ts';
import type { Readings } from './readings.ts';
import type { StripModel, Typing } from './stripModel.ts';

const FORM_WIDTH_PX = 300;

/** The small form that takes an exact place for an edge, as redshift, lookback time or distance. */
export function TypedEdge({ model }: { readonly model: StripModel }) {
  const typing = model.typing.value;
  if (typing === null) return null;
  return (
    <TypedEdgeForm
      key={`${typing.kind} ${typing.kind === 'move' ? typing.index : ''}`}
      model={model}
      typing={typing}
    />
  );
}

function TypedEdgeForm({ model, typing }: { readonly model: StripModel; readonly typing: Typing }) {
  const app = useApp();
  const id = useId();
  const input = useRef<HTMLInputElement>(null);
  const form = useRef<HTMLFormElement>(null);
  const cameFrom = useRef(document.activeElement);
  const [kind, setKind] = useState<RadialReading>(model.primary.peek().kind);
  const [text, setText] = useState(() => fieldText(round(model.readings.peek()[kind].shownAt(typing.z))));
  const [trouble, setTrouble] = useState<string | null>(null);
  const readings = model.readings.value;
  const scale = model.scale.value;
  useLayoutEffect(() => {
    input.current?.focus({ preventScroll: true });
    input.current?.select();
  }, []);

  const close = (): void => {
    model.typing.value = null;
    const back = cameFrom.current;
    if (back instanceof HTMLElement || back instanceof SVGElement) if (back.isConnected) back.focus();
  };
  const choose = (next: RadialReading): void => {
    const read = typedRedshift(text, kind, readings);
    if ('z' in read) setText(fieldText(round(readings[next].shownAt(read.z))));
    setKind(next);
    setTrouble(null);
  };
  const submit = (event: Event): void => {
    event.preventDefault();
    const read = typedRedshift(text, kind, readings);
    const edit =
      'sentence' in read ? null : typing.kind === 'move' ? moveEdge(typing.index, read.z) : addEdge(read.z);
    const why = 'sentence' in read ? read.sentence : refusalOf(edit!, app.studyState.study.peek());
    setTrouble(why);
    if (why !== null) return;
    app.studyState.perform(edit!);
    close();
  };
  const x = scale === null ? 0 : scale.at(typing.z);
  const width = model.size.value?.widthPx ?? FORM_WIDTH_PX;
  const title = typing.kind === 'move' ? `Edge ${typing.index + 1}` : 'New edge';
  return (
    <form
      ref={form}
      class="strip-typed"
      aria-label={title}
      style={{ left: `${Math.max(4, Math.min(width - FORM_WIDTH_PX - 4, x - FORM_WIDTH_PX / 2))}px` }}
      onSubmit={submit}
      onKeyDown={(event) => {
        event.stopPropagation();
        if (event.key === 'Escape') close();
      }}
      onFocusOut={(event) => {
        const to = event.relatedTarget;
        if (to instanceof Node && !form.current?.contains(to)) model.typing.value = null;
      }}
    >
      <label for={id}>{title}</label>
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
        onInput={(event) => setText(event.currentTarget.value)}
      />
      <select
        aria-label="Read as"
        value={kind}
        onChange={(event) => choose(event.currentTarget.value as RadialReading)}
      >
        {RADIAL_READINGS.map((one) => (
          <option key={one} value={one}>
            {readings[one].unit}
          </option>
        ))}
      </select>
      <button type="submit" class="button">
        {typing.kind === 'move' ? 'Move' : 'Add'}
      </button>
      {trouble === null ? null : (
        <p id={`${id}-trouble`} role="alert">
          {trouble}
        </p>
      )}
    </form>
  );
}

/** The redshift of what was typed in a reading, to the last digit; or why there is none. */
export function typedRedshift(
  text: string,
  kind: RadialReading,
  readings: Readings,
): { readonly z: number } | { readonly sentence: string } {
  const reading = readings[kind];
  const read = readNumber(text, kind === 'redshift' ? 'The redshift' : `The ${reading.words}`);
  if ('sentence' in read) return read;
  const deepest = reading.shownAt(DEEPEST_REDSHIFT);
  const unit = kind === 'redshift' ? '' : ` ${reading.unit}`;
  if (read.value < 0 || read.value > deepest)
    return {
      sentence: `The ${reading.words} is ${read.value}${unit}: give 0 to ${markText(Math.floor(deepest))}${unit}.`,
    };
  return { z: reading.exactRedshiftAt(read.value) };
}

// A refusal belongs beside the field that caused it, not among the notices.
function refusalOf(edit: Edit, study: Parameters<Edit['apply']>[0]): string | null {
  try {
    edit.apply(study);
    return null;
  } catch (error) {
    if (error instanceof Refusal) return error.message;
    throw error;
  }
}

function round(value: number): number {
  return Number(value.toPrecision(6));
}
