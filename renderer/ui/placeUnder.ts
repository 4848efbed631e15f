const EDGE_PX = 8;
const GAP_PX = 4;

/** Puts an open popover under its button, or over it where the foot of the window leaves less room; never beside the window. */
export function placeUnder(button: Element, popover: HTMLElement): void {
  const from = button.getBoundingClientRect();
  const { clientWidth, clientHeight } = document.documentElement;
  const room = clientWidth - popover.offsetWidth - EDGE_PX;
  popover.style.left = `${Math.max(EDGE_PX, Math.min(from.left, room))}px`;
  const [above, below] = [from.top - GAP_PX - EDGE_PX, clientHeight - from.bottom - GAP_PX - EDGE_PX];
  popover.style.maxHeight = 'none';
  const height = popover.offsetHeight;
  const upward = height > below && above > below;
  popover.style.maxHeight = `${upward ? above : below}px`;
  popover.style.top = `${upward ? from.top - GAP_PX - Math.min(height, above) : from.bottom + GAP_PX}px`;
}
