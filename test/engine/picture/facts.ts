import { EngineDesk } from '../../../renderer/engine/desk.ts';
import type { PictureFacts } from '../../../renderer/picture/numbers.ts';
import { makeLargeSurvey } from '../../../shared-core/demo/largeSurvey.ts';
import { DEMO_EDGES, DEMO_MAPPING, DEMO_REGION } from '../../../shared-core/demo/scenario.ts';
import { type PictureOptions, pictureOptions } from '../../../shared-core/picture/options.ts';
import { emptyStudy } from '../../../shared-core/study/document.ts';
import type { Study } from '../../../shared-core/study/schema.ts';

const COUNT = 3000;

/** A study of three fields and five shells. */
export const STUDY: Study = {
  ...emptyStudy('Three fields'),
  source: { kind: 'file', name: 'some.csv', path: null, sizeBytes: 1, sha256: null },
  mapping: DEMO_MAPPING,
  region: { parts: [...DEMO_REGION.parts], holes: [...DEMO_REGION.holes] } as Study['region'],
  edges: [...DEMO_EDGES],
};

/** What the engine makes of a study whose catalogue holds 3000 invented galaxies (or the rows given). */
export async function factsOf(
  study: Study = STUDY,
  rows: () => Iterable<Uint8Array> = () => makeLargeSurvey(COUNT),
): Promise<PictureFacts> {
  const facts: { -readonly [K in keyof PictureFacts]: PictureFacts[K] } = {
    study,
    fingerprint: 'ab'.repeat(32),
    selected: null,
    background: null,
    density: null,
    columns: [],
  };
  const desk = new EngineDesk({
    emit: (event) => {
      if (event.kind === 'failed') throw new Error(event.sentence);
      if (event.kind === 'selected') facts.selected = event.selected;
      if (event.kind === 'background') facts.background = event.background;
    },
    openUrl: () => Promise.resolve(stream(rows())),
    floats: (length) => new Float32Array(length),
    share: (sample) => sample,
    breathe: () => Promise.resolve(),
  });
  await desk.want({
    source: study.source === null ? null : { kind: 'url', url: 'some', name: 'some.csv', sizeBytes: 1 },
    mapping: study.mapping,
    cuts: study.cuts,
    region: study.region,
    cosmology: study.cosmology,
    density: false,
    columns: [],
  });
  return facts;
}

async function* stream(rows: Iterable<Uint8Array>): AsyncIterable<Uint8Array> {
  yield* rows;
}

/** Options of a small picture. */
export const small = (more: object = {}): PictureOptions =>
  pictureOptions({ widthPx: 480, heightPx: 300, dpi: 100, ...more });
