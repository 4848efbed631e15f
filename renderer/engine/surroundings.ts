import type { SortedSample } from '../../shared-core/shells/sample.ts';
import type { EngineEvent } from './protocol.ts';

/** What the desk needs of its surroundings: a thread in the window, plain objects in a test. */
export interface Surroundings {
  readonly emit: (event: EngineEvent) => void;
  /** `signal` ends it, also while nothing comes (a disk that sleeps, a network that stalls). */
  readonly openUrl: (url: string, signal?: AbortSignal) => Promise<AsyncIterable<Uint8Array>>;
  /** Shared memory where the host allows it, plain memory elsewhere. */
  readonly floats: (length: number) => Float32Array;
  /** The same for the sample: in shared memory it reaches the page without being copied there. */
  readonly share: (sample: SortedSample) => SortedSample;
  /** Lets waiting messages in, so that a newer wish can stop this one. */
  readonly breathe: () => Promise<void>;
}

/** What a stage is handed beside its inputs. */
export interface StageTools extends Pick<Surroundings, 'floats' | 'share'> {
  /** Lets waiting messages in; throws, and so ends the stage, when its wish is not wanted any more. */
  readonly pause: () => Promise<void>;
}
