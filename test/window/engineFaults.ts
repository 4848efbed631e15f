import type { Page } from '@playwright/test';

/**
 * Puts code before the engine's own, in its worker: what a disk or a memory does at its limits, made to happen every
 * time. Everything behind that code is the program's own.
 */
export async function engineWith(page: Page, code: () => void): Promise<void> {
  await page.route(/engine\.worker/, async (route) => {
    const response = await route.fetch();
    await route.fulfill({ response, body: `(${code})();\n${await response.text()}` });
  });
}

/** Of a file above 1 MB the first half comes, and then nothing more until the reading is given up. */
export function stallingDisk(): void {
  const own = self.fetch;
  self.fetch = async (url, options) => {
    const whole = await (await own(url)).blob();
    if (whole.size < 1e6) return new Response(whole);
    const half = new Uint8Array(await whole.slice(0, whole.size / 2).arrayBuffer());
    return new Response(
      new ReadableStream({
        start(controller) {
          controller.enqueue(half);
          options?.signal?.addEventListener('abort', () => controller.error(new Error('aborted')));
        },
      }),
    );
  };
}

/** Columns of more than 100 000 rows find no memory, with the error that a browser throws then. */
export function shortMemory(): void {
  self.Float64Array = new Proxy(Float64Array, {
    construct(Original, [first, ...rest], target) {
      if (typeof first === 'number' && first > 100_000)
        throw new RangeError('Array buffer allocation failed');
      return Reflect.construct(Original, [first, ...rest], target === self.Float64Array ? Original : target);
    },
  });
}

/** What is asked about regions waits for a word on the channel "regions"; "asked" is said there of each. */
export function regionsWait(): void {
  const channel = new BroadcastChannel('regions');
  const waiting: unknown[] = [];
  self.addEventListener('message', (event) => {
    const { data, isTrusted } = event;
    if (!isTrusted || data.kind !== 'checkRegions') return;
    event.stopImmediatePropagation();
    waiting.push(data);
    channel.postMessage('asked');
  });
  channel.onmessage = () => {
    for (const data of waiting.splice(0)) self.dispatchEvent(new MessageEvent('message', { data }));
  };
}
