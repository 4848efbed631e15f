import { Refusal } from '../../../shared-core/base/refusal.ts';
import type { PictureJob, PictureNews } from '../../../shared-core/picture/job.ts';
import type { FoundBrowser } from '../../launch/findBrowser.ts';
import { progressBar } from '../progress.ts';
import { writeOutput } from '../writeOutput.ts';
import { ByteQueue } from './byteQueue.ts';
import { startHeadless } from './headlessBrowser.ts';
import { type PictureServerOptions, startPictureServer } from './pictureServer.ts';

export interface PictureWork {
  readonly browser: FoundBrowser;
  readonly windowFolder: string;
  readonly job: Omit<PictureJob, 'catalogue'>;
  readonly catalogue: PictureServerOptions['catalogue'];
  /** Absolute path of the picture. */
  readonly path: string;
  readonly overwrite: boolean;
  readonly say: (text: string) => void;
}

const LONGEST_START_MS = 60_000;

/**
 * Has a picture drawn by a headless browser and writes it, so that its name never stands for half of it.
 * @throws Refusal: no place for it, the page's own sentence, a browser that does not start or ends early, cancelled
 */
export async function makePicture(work: PictureWork): Promise<void> {
  const queue = new ByteQueue();
  const what = work.job.film === null ? 'picture' : 'film';
  const bars = {
    catalogue: progressBar('Reading the catalogue'),
    picture: progressBar(`Drawing the ${what}`),
  };
  let received = 0;
  let heard: () => void = () => undefined;
  const started = new Promise<void>((resolve) => {
    heard = resolve;
  });
  const onNews = (news: PictureNews): void => {
    heard();
    if (news.kind === 'progress') {
      if (news.stage === 'picture') bars.catalogue.end();
      bars[news.stage].update(news.fraction);
    } else if (news.kind === 'remark') work.say(news.sentence);
    else if (news.kind === 'refused') queue.fail(new Refusal(news.sentence));
    else if (news.bytes === received) queue.end();
    else queue.fail(new Refusal(`Parts of the ${what} were lost on the way: try again.`));
  };
  const server = await startPictureServer({
    windowFolder: work.windowFolder,
    job: work.job,
    catalogue: work.catalogue,
    onNews,
    onPiece: async (bytes) => {
      heard();
      received += bytes.length;
      await queue.add(bytes);
    },
  });
  const cancel = () => queue.fail(new Refusal(`The ${what} was cancelled; nothing was written.`));
  process.once('SIGINT', cancel);
  process.once('SIGTERM', cancel);
  const writing = writeOutput(work.path, queue, { overwrite: work.overwrite });
  // A disk that says no ends the page's work too.
  writing.catch((error: unknown) => queue.fail(error instanceof Error ? error : new Error(String(error))));
  const browser = await startHeadless(work.browser, server.address);
  void browser.ended.then((reason) =>
    queue.fail(
      new Refusal(
        `The browser ${work.browser.path} ended before the ${what} was done${reason === null ? '; memory may have run short: choose a smaller size' : ` (${reason})`}.`,
      ),
    ),
  );
  const late = setTimeout(
    () =>
      queue.fail(
        new Refusal(
          `The browser ${work.browser.path} did not load the page: try another (CHROME_PATH names it).`,
        ),
      ),
    LONGEST_START_MS,
  );
  void started.then(() => clearTimeout(late));
  try {
    await writing;
  } finally {
    clearTimeout(late);
    process.off('SIGINT', cancel);
    process.off('SIGTERM', cancel);
    bars.catalogue.end();
    bars.picture.end();
    await browser.stop();
    await server.close();
  }
}
