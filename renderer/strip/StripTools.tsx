import { useSignal } from '@preact/signals';
import { useId } from 'preact/hooks';
import { changeLook } from '../../shared-core/study/edits.ts';
import { useApp } from '../state/app.ts';
import { readNumber } from '../ui/numberText.ts';
import { StripIcon, type StripIconName } from './StripIcon.tsx';
import { DIVIDING_SCHEMES, type DividingScheme, divideShells, rangeToDivide } from './schemes.ts';
import {
  mergeWithNext,
  middleOfShell,
  type ShellAction,
  splitShell,
  standingShell,
  takeOut,
  widestShell,
} from './shellActions.ts';
import type { StripModel } from './stripModel.ts';

const DEFAULT_SHELLS = 5;

/** The row over the strip: what can be done to the shells, and the schemes that lay them out anew. */
export function StripTools({ model }: { readonly model: StripModel }) {
  const app = useApp();
  const { studyState, view } = app;
  const { edges } = studyState.study.value;
  const scale = model.scale.value;
  const selected = standingShell(edges, view.selectedShell.value);
  const act = (action: ShellAction | null): void => {
    if (action !== null && studyState.perform(action.edit)) view.selectedShell.value = action.selected;
  };
  const add = (): void => {
    if (scale === null) return;
    const shell = selected ?? widestShell(edges, scale);
    const z =
      shell === null
        ? scale.redshiftAt((scale.leftPx + scale.rightPx) / 2)
        : middleOfShell(edges, shell, scale);
    model.typing.value = { kind: 'add', z };
  };
  const none = selected === null;
  const which = none ? 'choose a shell first' : `shell ${selected + 1}`;
  const last = none || selected + 2 >= edges.length;
  return (
    <div class="strip-tools">
      {/* biome-ignore lint/a11y/useSemanticElements: a fieldset would bring its own box and legend into the row */}
      <div class="strip-group" role="group" aria-label="Edges and shells">
        <Tool
          icon="add"
          label="Add edge"
          detail="type its place, or double-click in the strip"
          onClick={add}
        />
        <Tool
          icon="split"
          label="Split shell"
          detail={which}
          disabled={none || scale === null}
          onClick={() => !none && scale !== null && act(splitShell(edges, selected, scale))}
        />
        <Tool
          icon="merge"
          label="Merge with next"
          detail={none ? which : last ? 'there is no shell behind it' : which}
          disabled={last}
          onClick={() => !none && act(mergeWithNext(edges, selected))}
        />
        <Tool
          icon="remove"
          label="Remove shell"
          detail={which}
          disabled={none}
          onClick={() => !none && act(takeOut(edges, selected))}
        />
        <Tool
          icon="snap"
          label="Snap"
          detail="edges jump to round values"
          pressed={model.snap.value}
          onClick={() =>
            studyState.perform(
              changeLook(model.snap.peek() ? 'Stop snapping' : 'Snap edges to round values', {
                snap: !model.snap.peek(),
              }),
            )
          }
        />
      </div>
      <Divide model={model} />
    </div>
  );
}

function Divide({ model }: { readonly model: StripModel }) {
  const id = useId();
  const { studyState, derived, view, notices } = useApp();
  const { edges } = studyState.study.value;
  const present = Math.max(0, edges.length - 1);
  /** What was typed, while it was typed over this number of shells. */
  const typed = useSignal<{ readonly text: string; readonly over: number } | null>(null);
  const wholeSample = useSignal(false);
  const galaxies = derived.sample.value.count;
  const text = typed.value?.over === present ? typed.value.text : String(present || DEFAULT_SHELLS);

  const divide = (kind: DividingScheme): void => {
    const read = readNumber(text, 'The number of shells');
    if ('sentence' in read) return void notices.tell(read.sentence);
    const range = rangeToDivide(edges, galaxies, wholeSample.value, model.window.peek());
    const edit = divideShells(kind, read.value, range, derived.sample.value, derived.cosmology.value);
    if (!studyState.perform(edit)) return;
    view.selectedShell.value = standingShell(studyState.study.peek().edges, view.selectedShell.peek());
  };
  const hasChoice = present > 0 && galaxies > 0;
  return (
    // biome-ignore lint/a11y/useSemanticElements: a fieldset would bring its own box and legend into the row
    <div class="strip-group strip-divide" role="group" aria-label="Lay the shells out anew">
      <input
        id={id}
        class="strip-number"
        type="text"
        inputMode="numeric"
        autocomplete="off"
        value={text}
        onInput={(event) => void (typed.value = { text: event.currentTarget.value, over: present })}
        onKeyDown={(event) => {
          const by = { ArrowUp: 1, ArrowDown: -1 }[event.key];
          const now = Number(text);
          if (by === undefined || !Number.isInteger(now)) return;
          event.preventDefault();
          typed.value = { text: String(Math.max(1, now + by)), over: present };
        }}
      />
      <label for={id}>
        <span class="strip-wide">shells of </span>equal
      </label>
      <span class="strip-schemes">
        {DIVIDING_SCHEMES.map(({ kind, label, words }) => (
          <button
            key={kind}
            type="button"
            class="button"
            title={`Shells of equal ${words}`}
            aria-label={`${label}: shells of equal ${words}`}
            disabled={kind === 'count' && galaxies === 0}
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
            ? 'divide from the nearest to the farthest galaxy, not between the present edges'
            : 'needs galaxies and shells'
        }
        pressed={wholeSample.value}
        disabled={!hasChoice}
        onClick={() => void (wholeSample.value = !wholeSample.value)}
      />
    </div>
  );
}

/** A button with a drawing, and with its words where the strip is wide enough. */
export function Tool(props: {
  readonly icon: StripIconName;
  readonly label: string;
  readonly detail?: string;
  readonly pressed?: boolean;
  readonly disabled?: boolean;
  readonly onClick: () => void;
}) {
  const { icon, label, detail, pressed, disabled = false, onClick } = props;
  return (
    <button
      type="button"
      class="button strip-tool"
      aria-label={label}
      title={detail === undefined ? label : `${label}: ${detail}`}
      disabled={disabled}
      {...(pressed === undefined ? {} : { 'aria-pressed': pressed })}
      onClick={onClick}
    >
      <StripIcon name={icon} />
      <span class="strip-wide" aria-hidden="true">
        {label}
      </span>
    </button>
  );
}
