/** Milliseconds of work before the page may answer again. */
const BUDGET_MS = 6;

/** A new task of the page, so that input and drawing come in between. */
export const nextTask = (): Promise<void> =>
  new Promise((resolve) => {
    const { port1, port2 } = new MessageChannel();
    port1.onmessage = () => {
      port1.close();
      resolve();
    };
    port2.postMessage(null);
  });

/** Runs the steps in slices; null when the signal ended it. */
export async function runSliced<T>(steps: Generator<void, T>, signal: AbortSignal): Promise<T | null> {
  let sliceEnd = performance.now() + BUDGET_MS;
  for (;;) {
    if (signal.aborted) return null;
    const step = steps.next();
    if (step.done) return step.value;
    if (performance.now() < sliceEnd) continue;
    await nextTask();
    sliceEnd = performance.now() + BUDGET_MS;
  }
}
