/** Gives an element the focus once the window is drawn anew, since what had it is going away. */
export function focusSoon(id: string): void {
  requestAnimationFrame(() => document.getElementById(id)?.focus());
}
