import { useEffect } from 'preact/hooks';
import { changeLook } from '../shared-core/study/edits.ts';
import { RADIAL_READINGS } from '../shared-core/study/schema.ts';
import { fieldsInView } from './panels/fieldsInView.ts';
import { type KeyCommand, keyCommand } from './panels/keyCommands.ts';
import { keysShown } from './panels/keyTable.ts';
import { pictureShown } from './panels/picture/pictureShown.ts';
import type { App } from './state/app.ts';

const RADIAL_WORDS = {
  comoving: 'comoving distance',
  redshift: 'redshift',
  lookback: 'lookback time',
} as const;

/** Lets keys, and the desktop's menu, work the whole window. */
export function useKeys(app: App): void {
  useEffect(() => {
    const onKeyDown = (event: KeyboardEvent): void => {
      if (event.defaultPrevented || event.isComposing) return;
      // A dialog or an open menu has the keys to itself.
      if (document.querySelector('dialog:modal, [popover]:popover-open') !== null) return;
      const command = keyCommand(event, isTyping(event.target));
      if (command === null || (event.repeat && !REPEATS.has(command))) return;
      if (run(app, command)) event.preventDefault();
    };
    window.addEventListener('keydown', onKeyDown);
    const stopMenu = app.bridge.onMenuCommand((command) => {
      if (command === 'export') document.getElementById('export-menu')?.click();
      else run(app, command);
    });
    return () => {
      window.removeEventListener('keydown', onKeyDown);
      stopMenu();
    };
  }, [app]);
}

const REPEATS: ReadonlySet<KeyCommand> = new Set(['undo', 'redo', 'previousShell', 'nextShell']);

function isTyping(target: EventTarget | null): boolean {
  if (!(target instanceof HTMLElement)) return false;
  if (target instanceof HTMLInputElement)
    return !['checkbox', 'radio', 'button', 'range'].includes(target.type);
  return (
    target instanceof HTMLTextAreaElement || target instanceof HTMLSelectElement || target.isContentEditable
  );
}

/** @returns false when there was nothing to do, so that the key keeps its meaning for the browser */
function run(app: App, command: KeyCommand): boolean {
  const { studyState, files, view } = app;
  if (typeof command === 'object') {
    view.lookFrom(command.view);
    return true;
  }
  switch (command) {
    case 'undo':
      leaveField();
      studyState.undo();
      return true;
    case 'redo':
      leaveField();
      studyState.redo();
      return true;
    case 'save':
      leaveField();
      void files.save();
      return true;
    case 'saveAs':
      leaveField();
      void files.saveAs();
      return true;
    case 'open':
      void files.open('study');
      return true;
    case 'new':
      void files.newStudy();
      return true;
    case 'previousShell':
    case 'nextShell':
      return stepShell(app, command === 'nextShell' ? 1 : -1);
    case 'noShell':
      if (app.cancelReading()) return true;
      if (view.measuring.value) view.measuring.value = false;
      else if (view.explained.value !== null) view.explained.value = null;
      else view.selectedShell.value = null;
      return true;
    case 'nextField': {
      const count = fieldsInView(app).length;
      if (count < 2) return false;
      view.field.value = (view.field.value + 1) % count;
      return true;
    }
    case 'nextRadial': {
      const at = RADIAL_READINGS.indexOf(studyState.study.value.look.radial);
      const radial = RADIAL_READINGS[(at + 1) % RADIAL_READINGS.length]!;
      return studyState.perform(changeLook(`Read the radius as ${RADIAL_WORDS[radial]}`, { radial }));
    }
    case 'toggleH': {
      const perH = !studyState.study.value.look.perH;
      return studyState.perform(changeLook(perH ? 'Show Mpc/h' : 'Show Mpc', { perH }));
    }
    case 'picture':
      pictureShown.value = true;
      return true;
    case 'showKeys':
      keysShown.value = true;
      return true;
  }
}

/** What is being typed is taken before the study is saved or stepped. */
function leaveField(): void {
  if (document.activeElement instanceof HTMLInputElement) document.activeElement.blur();
}

function stepShell({ view, derived }: App, by: 1 | -1): boolean {
  const count = derived.shells.value.length;
  if (count === 0) return false;
  const at = view.selectedShell.value ?? (by > 0 ? -1 : count);
  view.selectedShell.value = Math.max(0, Math.min(count - 1, at + by));
  return true;
}
