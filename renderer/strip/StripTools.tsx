import { changeLook } from '../../shared-core/study/edits.ts';
import { useApp } from '../state/app.ts';
import { Divide } from './Divide.tsx';
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
import { Tool } from './Tool.tsx';

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
