/** What the hand on the stage asks for. Pixels are CSS pixels from the top left of the stage. */
export interface NavigationTarget {
  orbit(dxPx: number, dyPx: number): void;
  pan(dxPx: number, dyPx: number): void;
  zoom(factor: number, xPx: number, yPx: number): void;
  hover(at: readonly [number, number] | null): void;
  click(xPx: number, yPx: number, extend: boolean): void;
  /** A gesture has ended: the picture may come to rest. */
  settle(): void;
}

/** A press that moves less than this is a click. */
const CLICK_SLACK_PX = 4;

/**
 * Pointer and wheel on the stage: drag orbits, drag with Shift or another button pans, wheel and pinch zoom to the
 * pointer, two fingers pan. Answers a function that takes the listeners off.
 */
export function listen(stage: HTMLElement, target: NavigationTarget): () => void {
  const pointers = new Map<number, { x: number; y: number }>();
  let pressed: { x: number; y: number; pan: boolean; moved: boolean } | null = null;
  const end = new AbortController();
  const { signal } = end;
  const at = (event: MouseEvent): { x: number; y: number } => {
    const box = stage.getBoundingClientRect();
    return { x: event.clientX - box.left, y: event.clientY - box.top };
  };

  const down = (event: PointerEvent): void => {
    const p = at(event);
    pointers.set(event.pointerId, p);
    stage.setPointerCapture(event.pointerId);
    if (pointers.size === 1) pressed = { ...p, pan: event.shiftKey || event.button !== 0, moved: false };
    else if (pressed) pressed.moved = true;
  };

  const move = (event: PointerEvent): void => {
    const p = at(event);
    const before = pointers.get(event.pointerId);
    if (!before || !pressed) {
      if (event.pointerType !== 'touch') target.hover([p.x, p.y]);
      return;
    }
    if (pointers.size === 2) pinch(event.pointerId, before, p);
    else drag(before, p);
  };

  const drag = (before: { x: number; y: number }, p: { x: number; y: number }): void => {
    if (!pressed) return;
    if (!pressed.moved && Math.hypot(p.x - pressed.x, p.y - pressed.y) < CLICK_SLACK_PX) return;
    if (!pressed.moved) target.hover(null);
    pressed.moved = true;
    const [dx, dy] = [p.x - before.x, p.y - before.y];
    before.x = p.x;
    before.y = p.y;
    if (pressed.pan) target.pan(dx, dy);
    else target.orbit(dx, dy);
  };

  const pinch = (id: number, before: { x: number; y: number }, p: { x: number; y: number }): void => {
    const other = [...pointers].find(([key]) => key !== id)?.[1];
    if (!other) return;
    const old = Math.hypot(before.x - other.x, before.y - other.y);
    const now = Math.hypot(p.x - other.x, p.y - other.y);
    target.pan((p.x - before.x) / 2, (p.y - before.y) / 2);
    if (old > 4 && now > 4) target.zoom(now / old, (p.x + other.x) / 2, (p.y + other.y) / 2);
    before.x = p.x;
    before.y = p.y;
  };

  const up = (event: PointerEvent): void => {
    const known = pointers.delete(event.pointerId);
    if (!known || pointers.size > 0) return;
    const p = at(event);
    if (pressed && !pressed.moved && event.type === 'pointerup' && event.button === 0) {
      target.click(p.x, p.y, event.ctrlKey || event.metaKey || event.shiftKey);
    }
    pressed = null;
    target.settle();
  };

  const wheel = (event: WheelEvent): void => {
    event.preventDefault();
    const p = at(event);
    // Lines and pages of a wheel in pixels, as browsers scroll them.
    const unit = event.deltaMode === 1 ? 16 : event.deltaMode === 2 ? 400 : 1;
    const amount = Math.max(-240, Math.min(240, event.deltaY * unit));
    target.zoom(Math.exp(-amount * (event.ctrlKey ? 0.01 : 0.0018)), p.x, p.y);
    target.settle();
  };

  stage.addEventListener('pointerdown', down, { signal });
  stage.addEventListener('pointermove', move, { signal });
  stage.addEventListener('pointerup', up, { signal });
  stage.addEventListener('pointercancel', up, { signal });
  stage.addEventListener('pointerleave', () => target.hover(null), { signal });
  stage.addEventListener('wheel', wheel, { signal, passive: false });
  stage.addEventListener('contextmenu', (event) => event.preventDefault(), { signal });
  return () => end.abort();
}
