/**
 * Gives an element the focus once the window is drawn anew, since what had it is going away.
 *
 * @param had what had it before work that took a while (null: it goes away): whoever has gone elsewhere since stays there
 */
export function focusSoon(id: string, had?: Element | null): void {
  requestAnimationFrame(() => {
    const { activeElement, body } = document;
    if (had === undefined || activeElement === had || activeElement === body)
      document.getElementById(id)?.focus();
  });
}
