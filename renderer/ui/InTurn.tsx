import { useSignal } from '@preact/signals';
import type { ComponentChildren } from 'preact';
import { useLayoutEffect } from 'preact/hooks';
import { nextTask } from '../cone/points/slices.ts';

let last: Promise<void> = Promise.resolve();

/** Puts its content in place in a task of its own, one after the other: a whole window at once would block the page. */
export function InTurn({ children }: { readonly children: ComponentChildren }) {
  const there = useSignal(false);
  useLayoutEffect(() => {
    let gone = false;
    last = last.then(nextTask).then(() => {
      if (!gone) there.value = true;
    });
    return () => {
      gone = true;
    };
  }, [there]);
  return there.value ? children : null;
}
