import { cssColour, shellColours } from '../colour/shellColours.ts';
import { useApp } from '../state/app.ts';

/** The colours made last: every mark of a ledger asks for the same ones, and while an edge is dragged they stay. */
let last = { count: -1, ground: '', colours: [] as readonly string[] };

function coloursOf(count: number, ground: 'light' | 'dark'): readonly string[] {
  if (last.count !== count || last.ground !== ground)
    last = { count, ground, colours: shellColours(count, ground).map((triple) => cssColour(triple)) };
  return last.colours;
}

/** A shell's number with the colour it has in the cone. The number says which; the colour only helps. */
export function ShellMark({ index }: { readonly index: number }) {
  const { derived, view } = useApp();
  const colour = coloursOf(derived.shells.value.length, view.theme.value)[index];
  return (
    <span class="shell-mark">
      <span class="shell-colour" style={{ background: colour ?? 'transparent' }} aria-hidden="true" />
      {index + 1}
    </span>
  );
}
