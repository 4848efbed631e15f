import { type Signal, signal } from '@preact/signals';

/** What the person looks at: not part of the study, not undone, not saved. */
export interface ViewState {
  readonly selectedShell: Signal<number | null>;
  readonly hoveredShell: Signal<number | null>;
  /** Index, by redshift, of the galaxies pointed at: the first, and the one that it is measured to. */
  readonly pickedGalaxies: Signal<readonly number[]>;
  /** The part of the radial axis in view, in redshift; null shows all. Cone and strip share it. */
  readonly redshiftWindow: Signal<readonly [number, number] | null>;
  readonly theme: Signal<'light' | 'dark'>;
  /** Which of several fields on the sky is looked at side-on. */
  readonly field: Signal<number>;
  /** The quantity, by key, whose explanation is open. */
  readonly explained: Signal<string | null>;
}

export function createViewState(theme: 'light' | 'dark'): ViewState {
  return {
    selectedShell: signal(null),
    hoveredShell: signal(null),
    pickedGalaxies: signal([]),
    redshiftWindow: signal(null),
    theme: signal(theme),
    field: signal(0),
    explained: signal(null),
  };
}
