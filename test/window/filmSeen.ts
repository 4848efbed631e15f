import type { Browser } from '@playwright/test';

/** What a browser's own player sees of a film's file. */
export interface SeenFilm {
  readonly seconds: number;
  readonly width: number;
  readonly height: number;
  /** The pixels of each moment asked for, at the film's size. */
  readonly pictures: readonly (readonly number[])[];
}

/** Plays a film's file in a page and looks at it in the middle of some frames, in any order. */
export async function seenFilm(
  chrome: Browser,
  bytes: Buffer,
  type: string,
  atSeconds: readonly number[],
): Promise<SeenFilm> {
  const page = await chrome.newPage();
  try {
    return await page.evaluate(
      async ({ base64, mime, times }) => {
        const stored = Uint8Array.from(atob(base64), (letter) => letter.charCodeAt(0));
        const video = document.createElement('video');
        document.body.append(video);
        video.muted = true;
        video.preload = 'auto';
        const heard = (name: string) =>
          new Promise<void>((resolve, reject) => {
            video.addEventListener(name, () => resolve(), { once: true });
            video.addEventListener('error', () => reject(new Error(video.error?.message)), { once: true });
          });
        const loaded = heard('loadeddata');
        video.src = URL.createObjectURL(new Blob([stored], { type: mime }));
        await loaded;
        const { videoWidth: width, videoHeight: height, duration: seconds } = video;
        const context = new OffscreenCanvas(width, height).getContext('2d')!;
        const pictures: number[][] = [];
        for (const time of times) {
          // The seek has ended before its frame is there to be drawn.
          const shown = new Promise<void>((resolve) => video.requestVideoFrameCallback(() => resolve()));
          const there = heard('seeked');
          video.currentTime = time;
          await there;
          await shown;
          context.drawImage(video, 0, 0);
          pictures.push([...context.getImageData(0, 0, width, height).data]);
        }
        return { seconds, width, height, pictures };
      },
      { base64: bytes.toString('base64'), mime: type, times: atSeconds },
    );
  } finally {
    await page.close();
  }
}

/** Pixels that differ by more than the coding can make them. */
export function differing(a: readonly number[], b: readonly number[]): number {
  let count = 0;
  for (let i = 0; i < a.length; i += 4)
    if (Math.max(...[0, 1, 2].map((k) => Math.abs(a[i + k]! - b[i + k]!))) > 40) count++;
  return count;
}
