import { signal } from '@preact/signals';

/** Whether the list of keys is open. */
export const keysShown = signal(false);

const onMac = /Mac|iPhone|iPad/.test(globalThis.navigator?.userAgent ?? '');

/** How a shortcut with the command key is written here. */
export function shortcut(key: string, shift = false): string {
  return onMac ? `${shift ? '⇧' : ''}⌘${key}` : `Ctrl+${shift ? 'Shift+' : ''}${key}`;
}

export interface KeyHelp {
  readonly keys: readonly string[];
  readonly does: string;
}

/** Every key of the window, and what the mouse does, for the person who asks. */
export const KEY_HELP: readonly { readonly title: string; readonly rows: readonly KeyHelp[] }[] = [
  {
    title: 'Study',
    rows: [
      { keys: [shortcut('Z')], does: 'undo' },
      { keys: [shortcut('Z', true), shortcut('Y')], does: 'redo' },
      { keys: [shortcut('S')], does: 'save' },
      { keys: [shortcut('S', true)], does: 'save under another name' },
      { keys: [shortcut('O')], does: 'open a study' },
      { keys: [shortcut('N')], does: 'new study' },
      { keys: ['P'], does: 'picture to export' },
      { keys: ['Esc'], does: 'stop reading a catalogue' },
    ],
  },
  {
    title: 'Shells',
    rows: [
      { keys: ['['], does: 'choose the shell before' },
      { keys: [']'], does: 'choose the shell after' },
      { keys: ['Esc'], does: 'choose none' },
      { keys: ['→', 'Enter'], does: 'in the ledger, to the edges of the row; type one' },
    ],
  },
  {
    title: 'Depth strip',
    rows: [
      { keys: ['←', '→'], does: 'move the edge or the cursor; with Shift in larger steps' },
      { keys: ['Home', 'End'], does: 'to the neighbouring edge' },
      { keys: ['Enter'], does: 'type an edge; at the cursor, choose the shell' },
      { keys: ['Delete'], does: 'remove the edge' },
      { keys: ['A'], does: 'add an edge at the cursor' },
      { keys: ['+', '−', '0'], does: 'nearer, farther, all' },
    ],
  },
  {
    title: 'View',
    rows: [
      { keys: ['1'], does: 'side-on' },
      { keys: ['2'], does: 'down the cone' },
      { keys: ['3'], does: 'from behind' },
      { keys: ['4'], does: 'the whole survey' },
      { keys: ['5'], does: 'around the observer' },
      { keys: ['6'], does: 'all fields in parallel' },
      { keys: ['F'], does: 'next field' },
      { keys: ['R'], does: 'radius as distance, redshift, lookback time' },
      { keys: ['H'], does: 'Mpc or Mpc/h' },
      { keys: ['?'], does: 'these keys' },
    ],
  },
  {
    title: 'Mouse in the cone',
    rows: [
      { keys: ['click'], does: 'pick galaxy and shell' },
      { keys: ['Shift+click'], does: 'measure to a second galaxy; Esc ends measuring' },
      { keys: ['drag'], does: 'turn' },
      { keys: ['Shift+drag'], does: 'shift' },
      { keys: ['wheel'], does: 'nearer, farther' },
    ],
  },
  {
    title: 'Mouse in strip and ledger',
    rows: [
      { keys: ['drag'], does: 'move an edge; else shift the view' },
      { keys: ['double-click'], does: 'an edge: type it; elsewhere in the strip: add one' },
      { keys: ['wheel'], does: 'less depth, more' },
    ],
  },
];
