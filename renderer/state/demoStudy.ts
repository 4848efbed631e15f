import { DEFAULT_SEED } from '../../shared-core/demo/demoSurvey.ts';
import { DEMO_EDGES, DEMO_MAPPING, DEMO_NAME, DEMO_REGION } from '../../shared-core/demo/scenario.ts';
import { emptyStudy } from '../../shared-core/study/document.ts';
import { type Study, studySchema } from '../../shared-core/study/schema.ts';

/** The study shown at the first start: the invented survey, fully working. */
export function demoStudy(): Study {
  return studySchema.parse({
    ...emptyStudy(DEMO_NAME),
    source: { kind: 'demo', seed: DEFAULT_SEED },
    mapping: DEMO_MAPPING,
    region: DEMO_REGION,
    edges: DEMO_EDGES,
  });
}
