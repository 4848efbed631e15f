import { Refusal } from '../../../shared-core/base/refusal.ts';
import { utf8Bytes } from '../../../shared-core/base/textCoding.ts';
import type { PictureJob } from '../../../shared-core/picture/job.ts';
import type { PictureOptions } from '../../../shared-core/picture/options.ts';
import { columnsOf } from '../../../shared-core/study/colourBy.ts';
import { writeStudy } from '../../../shared-core/study/document.ts';
import type { Study } from '../../../shared-core/study/schema.ts';
import { EngineDesk } from '../../engine/desk.ts';
import type { EngineEvent, EngineSource } from '../../engine/protocol.ts';
import { startSha256 } from '../../engine/sourceBytes.ts';
import type { PictureFacts } from '../numbers.ts';

interface Listeners {
  readonly onProgress: (fraction: number) => void;
  readonly onRemark: (sentence: string) => void;
}

/**
 * Reads a study's catalogue with the engine that the window has.
 * @throws Refusal with the engine's sentence
 */
export async function gatherFacts(
  study: Study,
  options: PictureOptions,
  catalogue: PictureJob['catalogue'],
  { onProgress, onRemark }: Listeners,
): Promise<PictureFacts> {
  const facts: { -readonly [K in keyof PictureFacts]: PictureFacts[K] } = {
    study,
    fingerprint: fingerprintOf(study),
    selected: null,
    background: null,
    density: null,
    columns: [],
  };
  const troubles: string[] = [];
  const take = (event: EngineEvent): void => {
    if (event.kind === 'progress' && event.fraction !== null) onProgress(event.fraction);
    else if (event.kind === 'failed') troubles.push(event.sentence);
    else if (event.kind === 'selected') facts.selected = event.selected;
    else if (event.kind === 'background') facts.background = event.background;
    else if (event.kind === 'density') facts.density = event.density;
    else if (event.kind === 'columns') facts.columns = event.columns;
    else if (event.kind === 'loaded' && event.loaded !== null && study.source?.kind === 'file') {
      const { sha256 } = study.source;
      if (sha256 !== null && sha256 !== event.loaded.sha256)
        onRemark('The catalogue has changed since the study was saved; the picture shows it as it is now.');
    }
  };
  const desk = new EngineDesk({
    emit: take,
    openUrl: async (url) => {
      const answer = await fetch(url);
      if (!answer.ok || answer.body === null) throw new Refusal('The catalogue could not be read.');
      return answer.body as unknown as AsyncIterable<Uint8Array>;
    },
    floats: (length) => new Float32Array(length),
    share: (sample) => sample,
    breathe: () => new Promise((resume) => setTimeout(resume, 0)),
  });
  const colourBy = options.colourBy ?? study.look.colourBy;
  await desk.want({
    source: sourceOf(study, catalogue),
    mapping: study.mapping,
    cuts: study.cuts,
    region: study.region,
    cosmology: study.cosmology,
    density: colourBy === 'density',
    columns: columnsOf([colourBy]),
  });
  if (troubles.length > 0) throw new Refusal(troubles[0]!);
  return facts;
}

function sourceOf(study: Study, catalogue: PictureJob['catalogue']): EngineSource | null {
  if (study.source?.kind === 'demo') return study.source;
  return catalogue === null ? null : { kind: 'url', ...catalogue };
}

/** SHA-256 of the study's text as it is saved. */
export function fingerprintOf(study: Study): string {
  const hash = startSha256();
  hash.update(utf8Bytes(writeStudy(study)));
  return hash.digestHex();
}
