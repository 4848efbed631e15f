import { cssColour, shellColours } from '../colour/shellColours.ts';
import { useApp } from '../state/app.ts';

/** A shell's number with the colour it has in the cone. The number says which; the colour only helps. */
export function ShellMark({ index }: { readonly index: number }) {
  const { derived, view } = useApp();
  const triple = shellColours(derived.shells.value.length, view.theme.value)[index];
  return (
    <span class="shell-mark">
      <span
        class="shell-colour"
        style={{ background: triple === undefined ? 'transparent' : cssColour(triple) }}
        aria-hidden="true"
      />
      {index + 1}
    </span>
  );
}
