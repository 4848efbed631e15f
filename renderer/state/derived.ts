import { computed, type ReadonlySignal } from '@preact/signals';
import { Refusal } from '../../shared-core/base/refusal.ts';
import { type Cosmology, createCosmology } from '../../shared-core/cosmology/cosmology.ts';
import { findPublishedSet } from '../../shared-core/cosmology/publishedSets.ts';
import type { ShownUnits } from '../../shared-core/report/quantity.ts';
import { type RadialAxis, radialAxis } from '../../shared-core/shells/radial.ts';
import { type SortedSample, sortSample } from '../../shared-core/shells/sample.ts';
import type { ShellStatistics } from '../../shared-core/shells/shell.ts';
import { allAsOne, type ShellConditions, shellStatistics } from '../../shared-core/shells/statistics.ts';
import type { EngineState } from './engineState.ts';
import type { StudyState } from './studyState.ts';

/** Everything on screen that follows from the study and the engine's arrays, by the core's own functions. */
export interface Derived {
  readonly cosmology: ReadonlySignal<Cosmology>;
  readonly axis: ReadonlySignal<RadialAxis>;
  readonly units: ReadonlySignal<ShownUnits>;
  /** Empty while no catalogue is in: a plan has volumes without galaxies. */
  readonly sample: ReadonlySignal<SortedSample>;
  /** Null until a region is given or estimated. */
  readonly conditions: ReadonlySignal<ShellConditions | null>;
  readonly shells: ReadonlySignal<readonly ShellStatistics[]>;
  /** One shell from the first to the last edge. */
  readonly total: ReadonlySignal<ShellStatistics | null>;
  /** Why the shells cannot be measured in this cosmology; null when they can. */
  readonly trouble: ReadonlySignal<string | null>;
  /** The deepest redshift worth showing: of galaxies and edges. */
  readonly deepestRedshift: ReadonlySignal<number>;
}

const NOTHING = sortSample(new Float64Array(0), null);

export function createDerived({ study }: StudyState, engine: EngineState): Derived {
  // The parts are looked at one by one, so that an edge moved does not make a cosmology again.
  const parameters = computed(() => study.value.cosmology);
  const edges = computed(() => study.value.edges);
  const p0 = computed(() => study.value.p0Mpc3PerH3);
  const radial = computed(() => study.value.look.radial);
  const perH = computed(() => study.value.look.perH);

  // A study is checked when it is opened and edited, so its cosmology can always be made; the fallback keeps the
  // window alive if that should ever fail.
  const cosmology = computed(() => {
    try {
      return createCosmology(parameters.value);
    } catch (error) {
      if (error instanceof Refusal) return createCosmology(findPublishedSet('planck2018').parameters);
      throw error;
    }
  });
  const sample = computed(() => engine.selected.value?.sample ?? NOTHING);
  const area = computed(() => engine.footprint.value?.areaDeg2 ?? null);
  const conditions = computed<ShellConditions | null>(() =>
    area.value === null ? null : { cosmology: cosmology.value, areaDeg2: area.value, p0Mpc3PerH3: p0.value },
  );
  // A strongly closed universe ends: shells beyond it have no volume, and the sentence says so.
  const measured = computed(() => {
    if (conditions.value === null || edges.value.length < 2)
      return { shells: [], total: null, trouble: null };
    try {
      return {
        shells: shellStatistics(sample.value, edges.value, conditions.value),
        total: allAsOne(sample.value, edges.value, conditions.value),
        trouble: null,
      };
    } catch (error) {
      if (!(error instanceof Refusal)) throw error;
      return { shells: [], total: null, trouble: error.message };
    }
  });
  const shells = computed<readonly ShellStatistics[]>(() => measured.value.shells);
  const total = computed<ShellStatistics | null>(() => measured.value.total);
  return {
    cosmology,
    axis: computed(() => radialAxis(radial.value, cosmology.value)),
    units: computed(() => ({ perH: perH.value, h: cosmology.value.h })),
    sample,
    conditions,
    shells,
    total,
    trouble: computed(() => measured.value.trouble),
    deepestRedshift: computed(() => {
      const { redshift, count } = sample.value;
      const deepest = Math.max(count === 0 ? 0 : redshift[count - 1]!, edges.value.at(-1) ?? 0);
      return deepest === 0 ? 1 : deepest;
    }),
  };
}
