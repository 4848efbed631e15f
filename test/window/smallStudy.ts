import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { makeLargeSurvey } from '../../shared-core/demo/largeSurvey.ts';
import { DEMO_EDGES, DEMO_MAPPING, DEMO_REGION } from '../../shared-core/demo/scenario.ts';
import { emptyStudy, writeStudy } from '../../shared-core/study/document.ts';
import type { Study } from '../../shared-core/study/schema.ts';

/** A study of 3000 invented galaxies with its catalogue beside it: small, since every frame of a film draws all of them. */
export function smallStudy(folder: string): string {
  writeFileSync(join(folder, 'some.csv'), Buffer.concat([...makeLargeSurvey(3000)]));
  const study: Study = {
    ...emptyStudy('Three fields'),
    source: { kind: 'file', name: 'some.csv', path: null, sizeBytes: 0, sha256: null },
    mapping: DEMO_MAPPING,
    region: { parts: [...DEMO_REGION.parts], holes: [...DEMO_REGION.holes] } as Study['region'],
    edges: [...DEMO_EDGES],
  };
  writeFileSync(join(folder, 'some.study.json'), writeStudy(study));
  return 'some.study.json';
}
