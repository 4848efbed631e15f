import { batch, computed, effect, type ReadonlySignal, signal } from '@preact/signals';
import { columnsOf } from '../../shared-core/study/colourBy.ts';
import type { ColourBy } from '../../shared-core/study/schema.ts';
import { EngineClient } from '../engine/client.ts';
import type {
  Background,
  ColumnValues,
  EngineEvent,
  EngineSource,
  FootprintPicture,
  Loaded,
  Selected,
  Stage,
  Wanted,
} from '../engine/protocol.ts';
import type { StudyState } from './studyState.ts';

interface Failure {
  readonly stage: Stage | 'worker';
  readonly sentence: string;
}

/** What the engine has made of the study so far. */
export interface EngineState {
  readonly loaded: ReadonlySignal<Loaded | null>;
  /** The region of the study made ready, galaxies or none; null where none is given. */
  readonly region: ReadonlySignal<FootprintPicture | null>;
  readonly selected: ReadonlySignal<Selected | null>;
  /** What the numbers stand on: the region that the galaxies are in, given or estimated; without them that of a plan. */
  readonly footprint: ReadonlySignal<FootprintPicture | null>;
  readonly background: ReadonlySignal<Background | null>;
  /** Local density (log10, relative to the typical at that depth), sorted by redshift; made on demand. */
  readonly density: ReadonlySignal<Float32Array | null>;
  /** Columns that something is coloured by; made on demand. */
  readonly columns: ReadonlySignal<readonly ColumnValues[]>;
  /** What is being worked on; null when everything is up to date. */
  readonly progress: ReadonlySignal<{ readonly stage: Stage; readonly fraction: number | null } | null>;
  /**
   * False while the galaxies, region and cuts shown are not yet those of the study: numbers are then of what was
   * there before, shown faint, and not given out.
   */
  readonly fresh: ReadonlySignal<boolean>;
  /** False while any result may still be of an earlier study, distances and colours included. */
  readonly settled: ReadonlySignal<boolean>;
  /** Why a stage could not be done; results before it stand. */
  readonly failure: ReadonlySignal<Failure | null>;
  readonly client: EngineClient;
  /** What was read of the source that the study has now; null while it is being read. */
  readonly loadedNow: ReadonlySignal<Loaded | null>;
  /** Gives up reading the source. Nothing is read until it is asked for again, or there is another. */
  giveUpReading(sentence: string): void;
  /** Starts the engine anew and does everything again. */
  readAgain(): void;
  dispose(): void;
}

/**
 * Follows the study: whenever something that the engine's results depend on changes, the whole wish is sent, and the
 * engine does the stale stages again.
 *
 * @param alsoColour what something beside the cone colours galaxies by
 */
export function createEngineState(
  { study }: StudyState,
  source: ReadonlySignal<EngineSource | null>,
  alsoColour: ReadonlySignal<ColourBy | null>,
  makeWorker?: () => Worker,
): EngineState {
  const loaded = signal<Loaded | null>(null);
  const region = signal<FootprintPicture | null>(null);
  const selected = signal<Selected | null>(null);
  const background = signal<Background | null>(null);
  const density = signal<Float32Array | null>(null);
  const columns = signal<readonly ColumnValues[]>([]);
  const progress = signal<{ stage: Stage; fraction: number | null } | null>(null);
  const failure = signal<Failure | null>(null);

  const fresh = signal(false);
  const settled = signal(false);
  let serial = 0;
  /** The source that is not read until it is asked for again, with what is said of that. */
  let givenUp: { readonly source: string; readonly failure: Failure } | null = null;

  const receive = (event: EngineEvent): void => {
    switch (event.kind) {
      case 'progress':
        progress.value = { stage: event.stage, fraction: event.fraction };
        return;
      case 'region':
        region.value = event.region;
        return;
      case 'loaded':
        loaded.value = event.loaded;
        failure.value = givenUp?.failure ?? null;
        return;
      case 'selected':
        // The old background belongs to other galaxies: they must never be drawn together.
        background.value = null;
        density.value = null;
        columns.value = [];
        selected.value = event.selected && standingOn(event.selected, region.peek());
        failure.value = givenUp?.failure ?? null;
        return;
      case 'background':
        background.value = event.background;
        if (failure.value?.stage === 'background') failure.value = null;
        return;
      case 'density':
        density.value = event.density;
        if (failure.value?.stage === 'density') failure.value = null;
        return;
      case 'columns':
        columns.value = event.columns;
        if (failure.value?.stage === 'columns') failure.value = null;
        return;
      case 'failed':
        failure.value = { stage: event.stage, sentence: event.sentence };
        progress.value = null;
        if (event.stage === 'load') loaded.value = null;
        if (event.stage === 'load' || event.stage === 'select') selected.value = null;
        // Distances and densities of these galaxies failed: their columns are still theirs, and are not sent again.
        if (event.stage !== 'background' && event.stage !== 'density') columns.value = [];
        if (event.stage === 'columns') return;
        if (event.stage !== 'density') background.value = null;
        density.value = null;
        return;
      case 'idle':
        if (event.serial !== serial) return;
        progress.value = null;
        fresh.value = true;
        settled.value = true;
    }
  };
  const client = new EngineClient({
    // One event is one change: between its parts, galaxies would stand beside what belongs to others.
    onEvent: (event) => batch(() => receive(event)),
    onDeath: (sentence) => {
      progress.value = null;
      failure.value = { stage: 'worker', sentence };
    },
    ...(makeWorker === undefined ? {} : { makeWorker }),
  });

  const wanted = computed<Wanted>(() => {
    const { mapping, cuts, region, cosmology, look } = study.value;
    const colours = [look.colourBy, alsoColour.value];
    return {
      source: source.value,
      mapping,
      cuts,
      region,
      cosmology,
      density: colours.includes('density'),
      columns: columnsOf(colours),
    };
  });
  let sent: Wanted | null = null;
  const send = (): void => {
    if (givenUp?.source !== JSON.stringify(wanted.value.source)) givenUp = null;
    // A plan has its region and volumes also while its catalogue is not read.
    const wish = givenUp === null ? wanted.value : { ...wanted.value, source: null };
    if (sent !== null && sameParts(sent, wish, EVERYTHING)) return;
    if (sent === null || !sameParts(sent, wish, GALAXIES)) fresh.value = false;
    settled.value = false;
    sent = wish;
    client.want(wish, ++serial);
  };
  const stopFollowing = effect(send);
  return {
    loaded,
    region,
    selected,
    footprint: computed(() => selected.value?.footprint ?? region.value),
    background,
    density,
    columns,
    progress,
    fresh,
    settled,
    failure,
    client,
    loadedNow: computed(() => {
      const read = loaded.value;
      return JSON.stringify(read?.source) === JSON.stringify(source.value) ? read : null;
    }),
    giveUpReading(sentence) {
      client.stop();
      sent = null;
      givenUp = { source: JSON.stringify(source.peek()), failure: { stage: 'load', sentence } };
      batch(() => receive({ kind: 'failed', stage: 'load', sentence }));
      send();
    },
    readAgain() {
      client.stop();
      givenUp = null;
      failure.value = null;
      sent = null;
      send();
    },
    dispose() {
      stopFollowing();
      client.stop();
    },
  };
}

const GALAXIES = ['source', 'mapping', 'cuts', 'region'] as const;
const EVERYTHING = [...GALAXIES, 'cosmology', 'density', 'columns'] as const;

// A part that no edit touched is the same object, so a polygon of many vertices costs nothing while an edge is dragged.
function sameParts(a: Wanted, b: Wanted, parts: readonly (keyof Wanted)[]): boolean {
  return parts.every((part) => a[part] === b[part] || JSON.stringify(a[part]) === JSON.stringify(b[part]));
}

/** A given region is the same before and after its galaxies have come: what is drawn of it need not be drawn again. */
const standingOn = (selected: Selected, region: FootprintPicture | null): Selected =>
  region !== null && selected.footprint?.origin === 'given' ? { ...selected, footprint: region } : selected;
