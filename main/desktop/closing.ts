/** What a window told its host about itself, and what was asked of it since. */
export interface CloseState {
  unsaved: boolean;
  /** The page was asked and has not answered yet. */
  asked: boolean;
  /** The page, or the user in a dialog, agreed to close. */
  agreed: boolean;
}

/**
 * What to do when a window is to close: nothing unsaved, or agreed: close. Unsaved: let the page ask. Asked a second
 * time without an answer, the page may hang: ask the user by the system's own dialog.
 */
export function closeDecision({ unsaved, asked, agreed }: CloseState): 'close' | 'askPage' | 'askUser' {
  if (agreed || !unsaved) return 'close';
  return asked ? 'askUser' : 'askPage';
}

/** The dialog for a page that does not answer. Its unsaved work was kept a moment ago, so closing loses little. */
export const CLOSE_DIALOG = {
  type: 'warning' as const,
  message: 'This window has unsaved work.',
  detail: 'If you close it now, the work that was kept last is offered when you start the program again.',
  buttons: ['Keep the window', 'Close it'],
  defaultId: 0,
  cancelId: 0,
};

/** After a page died: load it again, but not for ever. Its kept work is offered by the page that loads. */
export function afterPageDied(
  reason: string,
  diedMs: readonly number[],
  nowMs: number,
): 'nothing' | 'load' | 'giveUp' {
  if (reason === 'clean-exit') return 'nothing';
  return diedMs.filter((ms) => nowMs - ms < 60_000).length < 3 ? 'load' : 'giveUp';
}
