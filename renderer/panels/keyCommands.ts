import type { CameraView } from '../state/viewState.ts';

/** What a key asks for. */
export type KeyCommand =
  | 'undo'
  | 'redo'
  | 'save'
  | 'saveAs'
  | 'open'
  | 'new'
  | 'previousShell'
  | 'nextShell'
  | 'noShell'
  | 'nextField'
  | 'nextRadial'
  | 'toggleH'
  | 'picture'
  | 'showKeys'
  | { readonly view: CameraView };

/** The part of a keyboard event that decides. */
export interface KeyPress {
  readonly key: string;
  readonly ctrlKey: boolean;
  readonly metaKey: boolean;
  readonly altKey: boolean;
  readonly shiftKey: boolean;
}

const PLAIN: Readonly<Record<string, KeyCommand>> = {
  '[': 'previousShell',
  ']': 'nextShell',
  Escape: 'noShell',
  f: 'nextField',
  r: 'nextRadial',
  h: 'toggleH',
  p: 'picture',
  '?': 'showKeys',
  '1': { view: 'side-on' },
  '2': { view: 'down-the-cone' },
  '3': { view: 'from-behind' },
  '4': { view: 'whole' },
  '5': { view: 'around' },
  '6': { view: 'parallel' },
};
const WITH_COMMAND: Readonly<Record<string, KeyCommand>> = {
  z: 'undo',
  y: 'redo',
  s: 'save',
  o: 'open',
  n: 'new',
};
const WITH_SHIFT: Readonly<Record<string, KeyCommand>> = { z: 'redo', s: 'saveAs' };

/**
 * The command of a key press, or null. While a person types into a field, only commands that no field knows itself
 * (save, open, new) are taken: undo belongs to the field there.
 */
export function keyCommand(press: KeyPress, typing: boolean): KeyCommand | null {
  const key = press.key.length === 1 ? press.key.toLowerCase() : press.key;
  if (press.ctrlKey || press.metaKey) {
    // AltGr comes as Ctrl+Alt on some keyboards, and writes brackets there.
    if (press.altKey) return typing ? null : key === '[' || key === ']' ? PLAIN[key]! : null;
    const found = (press.shiftKey ? WITH_SHIFT : WITH_COMMAND)[key] ?? null;
    return typing && (found === 'undo' || found === 'redo') ? null : found;
  }
  if (typing || (press.altKey && key !== '[' && key !== ']')) return null;
  return PLAIN[key] ?? null;
}
