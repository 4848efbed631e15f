import { Refusal } from '../../../shared-core/base/refusal.ts';
import { filmFrames, filmOptions, waitText } from '../../../shared-core/picture/film.ts';
import {
  isFilmFormat,
  PICTURE_PATHS,
  type PictureFormat,
  type PictureJob,
  type PictureNews,
  pictureJobSchema,
} from '../../../shared-core/picture/job.ts';
import { type PictureOptions, pictureOptions } from '../../../shared-core/picture/options.ts';
import { readStudy } from '../../../shared-core/study/document.ts';
import { sentenceOf } from '../../engine/sentenceOf.ts';
import { demoStudy } from '../../state/demoStudy.ts';
import { composePicture } from '../composePicture.ts';
import { composeFilm } from '../film/composeFilm.ts';
import { renderFilm } from '../film/renderFilm.ts';
import { colourRemark, type PictureFacts } from '../numbers.ts';
import { renderPng } from '../renderPng.ts';
import { sceneToPdf } from '../sceneToPdf.ts';
import { sceneToSvg } from '../sceneToSvg.ts';
import type { ByteSink, WriteOptions } from '../write/sink.ts';
import { gatherFacts } from './gatherFacts.ts';
import { PieceSender } from './pieceSender.ts';

const WRITERS: Readonly<Record<PictureFormat, typeof renderPng>> = {
  png: renderPng,
  svg: sceneToSvg,
  pdf: sceneToPdf,
};
/** Frames after which the time of a film can be told. */
const TIMED_FRAMES = 5;

/** The page without a face: takes one picture's job from the command, and sends its bytes back. */
async function work(): Promise<void> {
  const job = pictureJobSchema.parse(await (await asked(PICTURE_PATHS.job)).json());
  const options = pictureOptions(job.options);
  const study = job.study === null ? demoStudy() : readStudy(job.study);
  const facts = await gatherFacts(study, options, job.catalogue, {
    onProgress: (fraction) => void tell({ kind: 'progress', stage: 'catalogue', fraction }),
    onRemark: (sentence) => void tell({ kind: 'remark', sentence }),
  });
  const remark = colourRemark(options, facts);
  if (remark !== null) await tell({ kind: 'remark', sentence: remark });
  const sender = new PieceSender((bytes) => asked(PICTURE_PATHS.piece, bytes));
  await write(job, options, facts, sender, {
    onProgress: (fraction) => void tell({ kind: 'progress', stage: 'picture', fraction }),
  });
  await sender.end();
  await tell({ kind: 'done', bytes: sender.sentBytes });
}

async function write(
  { format, film }: PictureJob,
  options: PictureOptions,
  facts: PictureFacts,
  sink: ByteSink,
  { onProgress }: Required<Pick<WriteOptions, 'onProgress'>>,
): Promise<void> {
  if (!isFilmFormat(format)) {
    await WRITERS[format](composePicture(options, facts), sink, { onProgress });
    return;
  }
  const wanted = filmOptions(film);
  const frames = filmFrames(wanted);
  const composed = composeFilm(options, wanted, facts);
  const began = performance.now();
  await renderFilm(composed, format, sink, {
    onProgress: (fraction) => {
      onProgress(fraction);
      if (Math.round(fraction * frames) !== TIMED_FRAMES) return;
      const seconds = ((performance.now() - began) / 1000) * (frames / TIMED_FRAMES - 1);
      void tell({ kind: 'remark', sentence: `The film takes ${waitText(seconds)} from here.` });
    },
  });
}

async function asked(path: string, body?: BodyInit): Promise<Response> {
  const answer = await fetch(`./${path}`, body === undefined ? {} : { method: 'POST', body });
  if (!answer.ok) throw new Refusal(`The command does not take the picture any more (${answer.status}).`);
  return answer;
}

const tell = (news: PictureNews): Promise<unknown> =>
  asked(PICTURE_PATHS.news, JSON.stringify(news)).catch(() => undefined);

work().catch((error: unknown) => tell({ kind: 'refused', sentence: sentenceOf(error) }));
