import { Refusal } from '../base/refusal.ts';
import { validateCosmology } from '../cosmology/parameters.ts';
import { findPublishedSet, publishedSetKey } from '../cosmology/publishedSets.ts';
import { checkSomeEdges } from '../shells/edges.ts';
import { DEFAULT_P0_MPC3_PER_H3 } from '../shells/statistics.ts';
import { compileRegion } from '../sky/compileRegion.ts';
import { MIGRATIONS, type Migrations } from './migrations.ts';
import { STUDY_FORMAT, STUDY_VERSION, type Study, studySchema, USUAL_LIGHT } from './schema.ts';

/** What a study is called before anybody has named it: no title for a picture. */
export const UNNAMED = 'Untitled';

/** A study with nothing in it yet: Planck 2018, no catalogue, no shells. */
export function emptyStudy(name = UNNAMED): Study {
  const set = findPublishedSet('planck2018');
  return {
    format: STUDY_FORMAT,
    version: STUDY_VERSION,
    name,
    source: null,
    mapping: null,
    cuts: [],
    region: null,
    cosmology: { ...set.parameters, neutrinoMassesEv: [...set.parameters.neutrinoMassesEv] },
    cosmologySet: set.key,
    edges: [],
    p0Mpc3PerH3: DEFAULT_P0_MPC3_PER_H3,
    look: {
      radial: 'comoving',
      perH: false,
      colourBy: 'redshift',
      colourMap: 'harbour',
      light: USUAL_LIGHT,
      sideways: null,
      snap: false,
    },
  };
}

/** The text of a study's file: JSON, indented, ending with a line feed. */
export function writeStudy(study: Study): string {
  return `${JSON.stringify(study, null, 2)}\n`;
}

/**
 * Reads and checks a study's text.
 * @throws Refusal with a sentence: not JSON, not a study, of a newer version, or a value that cannot be used
 */
export function readStudy(text: string, migrations: Migrations = MIGRATIONS): Study {
  let raw: unknown;
  try {
    raw = JSON.parse(text);
  } catch {
    throw new Refusal('This file is not JSON, a study was expected: choose a file that Conewright saved.');
  }
  const header = raw as { format?: unknown; version?: unknown } | null;
  if (typeof raw !== 'object' || raw === null || header?.format !== STUDY_FORMAT)
    throw new Refusal(
      `This JSON file is not a study ("format" is not "${STUDY_FORMAT}"): choose a file that Conewright saved.`,
    );
  const { version } = header;
  if (typeof version !== 'number' || !Number.isInteger(version) || version < 0)
    throw new Refusal(
      `The study's version is ${JSON.stringify(version)}, expected a whole number: the file is damaged.`,
    );
  if (version > STUDY_VERSION)
    throw new Refusal(
      `The study is of version ${version}, this program reads up to version ${STUDY_VERSION}: open it with a newer Conewright.`,
    );
  let current: unknown = raw;
  for (let v = version; v < STUDY_VERSION; v++) {
    const migrate = migrations[v];
    if (migrate === undefined)
      throw new Refusal(
        `The study is of version ${v}, which this program can no longer read: save it again with an older Conewright.`,
      );
    current = migrate(current as Record<string, unknown>);
  }
  const parsed = studySchema.safeParse(current);
  if (!parsed.success) {
    const issue = parsed.error.issues[0];
    const place = issue?.path.map(String).join('.') || 'the file';
    throw new Refusal(
      `The study cannot be used: at ${place}, ${issue?.message ?? 'something unexpected'}. Nothing was changed.`,
    );
  }
  checkMeaning(parsed.data);
  // A name stands for its paper's numbers: a study edited by hand may not lend it to others.
  return { ...parsed.data, cosmologySet: publishedSetKey(parsed.data.cosmology) };
}

function checkMeaning(study: Study): void {
  try {
    checkSomeEdges(study.edges);
    validateCosmology(study.cosmology);
    if (study.region !== null) compileRegion(study.region);
  } catch (error) {
    if (error instanceof Refusal) throw new Refusal(`The study cannot be used: ${error.message}`);
    throw error;
  }
}
