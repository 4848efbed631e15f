import type { RefObject } from 'preact';
import { useLayoutEffect } from 'preact/hooks';

/**
 * Tells the size of an element's content in CSS pixels whenever the page has laid it out. Asking for it sooner would
 * lay the whole window out once more.
 */
export function useBoxSize(
  box: RefObject<Element | null>,
  tell: (widthPx: number, heightPx: number) => void,
): void {
  useLayoutEffect(() => {
    const watch = new ResizeObserver(([entry]) => {
      if (entry !== undefined) tell(entry.contentRect.width, entry.contentRect.height);
    });
    watch.observe(box.current!);
    return () => watch.disconnect();
  }, [box]);
}
