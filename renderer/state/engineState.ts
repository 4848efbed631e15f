import { computed, effect, type ReadonlySignal, signal } from '@preact/signals';
import { EngineClient } from '../engine/client.ts';
import type {
  Background,
  EngineEvent,
  EngineSource,
  Loaded,
  Selected,
  Stage,
  Wanted,
} from '../engine/protocol.ts';
import type { StudyState } from './studyState.ts';

/** What the engine has made of the study so far. */
export interface EngineState {
  readonly loaded: ReadonlySignal<Loaded | null>;
  readonly selected: ReadonlySignal<Selected | null>;
  readonly background: ReadonlySignal<Background | null>;
  /** Local density (log10, relative to the typical at that depth), sorted by redshift; made on demand. */
  readonly density: ReadonlySignal<Float32Array | null>;
  /** What is being worked on; null when everything is up to date. */
  readonly progress: ReadonlySignal<{ readonly stage: Stage; readonly fraction: number | null } | null>;
  /** Why a stage could not be done; results before it stand. */
  readonly failure: ReadonlySignal<{ readonly stage: Stage | 'worker'; readonly sentence: string } | null>;
  readonly client: EngineClient;
  /** Starts the engine anew and does everything again. */
  readAgain(): void;
  dispose(): void;
}

/**
 * Follows the study: whenever something that the engine's results depend on changes, the whole wish is sent, and the
 * engine does the stale stages again.
 */
export function createEngineState(
  { study }: StudyState,
  source: ReadonlySignal<EngineSource | null>,
  makeWorker?: () => Worker,
): EngineState {
  const loaded = signal<Loaded | null>(null);
  const selected = signal<Selected | null>(null);
  const background = signal<Background | null>(null);
  const density = signal<Float32Array | null>(null);
  const progress = signal<{ stage: Stage; fraction: number | null } | null>(null);
  const failure = signal<{ stage: Stage | 'worker'; sentence: string } | null>(null);

  const receive = (event: EngineEvent): void => {
    switch (event.kind) {
      case 'progress':
        progress.value = { stage: event.stage, fraction: event.fraction };
        return;
      case 'loaded':
        loaded.value = event.loaded;
        failure.value = null;
        return;
      case 'selected':
        // The old background belongs to other galaxies: they must never be drawn together.
        background.value = null;
        density.value = null;
        selected.value = event.selected;
        failure.value = null;
        return;
      case 'background':
        background.value = event.background;
        return;
      case 'density':
        density.value = event.density;
        return;
      case 'failed':
        failure.value = { stage: event.stage, sentence: event.sentence };
        progress.value = null;
        if (event.stage === 'load') loaded.value = null;
        if (event.stage === 'load' || event.stage === 'select') {
          selected.value = null;
          background.value = null;
          density.value = null;
        }
        return;
      case 'idle':
        progress.value = null;
    }
  };
  const client = new EngineClient({
    onEvent: receive,
    onDeath: (sentence) => {
      progress.value = null;
      failure.value = { stage: 'worker', sentence };
    },
    ...(makeWorker === undefined ? {} : { makeWorker }),
  });

  const wanted = computed<Wanted>(() => {
    const { mapping, cuts, region, cosmology, look } = study.value;
    return { source: source.value, mapping, cuts, region, cosmology, density: look.colourBy === 'density' };
  });
  let sent = '';
  const send = (): void => {
    const wish = wanted.value;
    const text = JSON.stringify(wish);
    if (text === sent) return;
    sent = text;
    client.want(wish);
  };
  const stopFollowing = effect(send);
  return {
    loaded,
    selected,
    background,
    density,
    progress,
    failure,
    client,
    readAgain() {
      client.stop();
      failure.value = null;
      sent = '';
      send();
    },
    dispose() {
      stopFollowing();
      client.stop();
    },
  };
}
