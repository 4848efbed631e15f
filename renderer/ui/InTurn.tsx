import { useSignal } from '@preact/signals';
import type { ComponentChildren } from 'preact';
import { useLayoutEffect } from 'preact/hooks';
import { nextTask } from '../cone/points/slices.ts';

/** A window in the background draws nothing: it is put together all the same. */
const LONGEST_FRAME_MS = 100;

let last: Promise<void> = Promise.resolve();

/**
 * Puts its content in place in a frame of its own, one after the other: a whole window at once would block the page.
 *
 * @param frames how many frames the content needs before the next is put in place
 */
export function InTurn({
  children,
  frames = 1,
}: {
  readonly children: ComponentChildren;
  readonly frames?: number;
}) {
  const there = useSignal(false);
  useLayoutEffect(() => {
    let gone = false;
    last = last.then(async () => {
      if (!gone) there.value = true;
      for (let i = 0; i < frames; i++) await frameDrawn();
    });
    return () => {
      gone = true;
    };
  }, [there]);
  return there.value ? children : null;
}

/** What was put in place has been laid out and painted. */
async function frameDrawn(): Promise<void> {
  await new Promise<void>((resolve) => {
    requestAnimationFrame(() => resolve());
    setTimeout(resolve, LONGEST_FRAME_MS);
  });
  await nextTask();
}
