/**
 * Puts text on the clipboard. The permission-free way comes first: the desktop host grants no permissions, and in a
 * browser the newer call may ask.
 * @returns whether it is there
 */
export async function copyText(text: string): Promise<boolean> {
  let taken = false;
  const give = (event: ClipboardEvent): void => {
    event.clipboardData?.setData('text/plain', text);
    event.preventDefault();
    event.stopImmediatePropagation();
    taken = event.clipboardData !== null;
  };
  window.addEventListener('copy', give, { capture: true, once: true });
  try {
    if (document.execCommand('copy') && taken) return true;
  } finally {
    window.removeEventListener('copy', give, { capture: true });
  }
  try {
    await navigator.clipboard.writeText(text);
    return true;
  } catch {
    return false;
  }
}
