import { Refusal } from '../../../shared-core/base/refusal.ts';
import { PICTURE_PATHS, type PictureNews, pictureJobSchema } from '../../../shared-core/picture/job.ts';
import { pictureOptions } from '../../../shared-core/picture/options.ts';
import { readStudy } from '../../../shared-core/study/document.ts';
import { sentenceOf } from '../../engine/desk.ts';
import { demoStudy } from '../../state/demoStudy.ts';
import { composePicture } from '../composePicture.ts';
import { renderPng } from '../renderPng.ts';
import { sceneToPdf } from '../sceneToPdf.ts';
import { sceneToSvg } from '../sceneToSvg.ts';
import { gatherFacts } from './gatherFacts.ts';
import { PieceSender } from './pieceSender.ts';

const WRITERS = { png: renderPng, svg: sceneToSvg, pdf: sceneToPdf } as const;

/** The page without a face: takes one picture's job from the command, and sends its bytes back. */
async function work(): Promise<void> {
  const job = pictureJobSchema.parse(await (await asked(PICTURE_PATHS.job)).json());
  const options = pictureOptions(job.options);
  const study = job.study === null ? demoStudy() : readStudy(job.study);
  const facts = await gatherFacts(study, options, job.catalogue, {
    onProgress: (fraction) => void tell({ kind: 'progress', stage: 'catalogue', fraction }),
    onRemark: (sentence) => void tell({ kind: 'remark', sentence }),
  });
  const scene = composePicture(options, facts);
  const sender = new PieceSender((bytes) => asked(PICTURE_PATHS.piece, bytes));
  await WRITERS[job.format](scene, sender, {
    onProgress: (fraction) => void tell({ kind: 'progress', stage: 'picture', fraction }),
  });
  await sender.end();
  await tell({ kind: 'done', bytes: sender.sentBytes });
}

async function asked(path: string, body?: BodyInit): Promise<Response> {
  const answer = await fetch(`./${path}`, body === undefined ? {} : { method: 'POST', body });
  if (!answer.ok) throw new Refusal(`The command does not take the picture any more (${answer.status}).`);
  return answer;
}

const tell = (news: PictureNews): Promise<unknown> =>
  asked(PICTURE_PATHS.news, JSON.stringify(news)).catch(() => undefined);

work().catch((error: unknown) => tell({ kind: 'refused', sentence: sentenceOf(error) }));
