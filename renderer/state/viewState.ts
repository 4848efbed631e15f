import { batch, type Signal, signal } from '@preact/signals';
import type { ColourBy } from '../../shared-core/study/schema.ts';

/** From where the cone is to be seen. */
export const CAMERA_VIEWS = [
  'side-on',
  'down-the-cone',
  'from-behind',
  'whole',
  'around',
  'parallel',
] as const;
export type CameraView = (typeof CAMERA_VIEWS)[number];

/** Where new shells are to begin and end, as typed, in redshift; empty for where they begin and end now. */
export interface TypedRange {
  readonly from: string;
  readonly to: string;
}

export const NOTHING_TYPED: TypedRange = { from: '', to: '' };

/** What the person looks at: not part of the study, not undone, not saved. */
export interface ViewState {
  readonly selectedShell: Signal<number | null>;
  readonly hoveredShell: Signal<number | null>;
  /** Index, by redshift, of the galaxies pointed at: the first, and the one that it is measured to. */
  readonly pickedGalaxies: Signal<readonly number[]>;
  /** Whether the next click on a galaxy measures to it. */
  readonly measuring: Signal<boolean>;
  /** The part of the radial axis in view, in redshift; null shows all. Cone and strip share it. */
  readonly redshiftWindow: Signal<readonly [number, number] | null>;
  readonly theme: Signal<'light' | 'dark'>;
  /** Which of several fields on the sky is looked at side-on. */
  readonly field: Signal<number>;
  /** The view asked for last, by key or button. */
  readonly cameraView: Signal<CameraView>;
  /** How often a view was asked for: asking again for the same one brings the camera back after orbiting. */
  readonly cameraAsked: Signal<number>;
  /** Asks for a view. */
  lookFrom(view: CameraView): void;
  /** What the open picture bench colours by, where that is not the study's choice. */
  readonly pictureColour: Signal<ColourBy | null>;
  /** The range typed for shells to be laid out in. */
  readonly typedRange: Signal<TypedRange>;
  /** The quantity, by key, whose explanation is open. */
  readonly explained: Signal<string | null>;
}

export function createViewState(theme: 'light' | 'dark'): ViewState {
  const cameraView = signal<CameraView>('side-on');
  const cameraAsked = signal(0);
  return {
    selectedShell: signal(null),
    hoveredShell: signal(null),
    pickedGalaxies: signal([]),
    measuring: signal(false),
    redshiftWindow: signal(null),
    theme: signal(theme),
    field: signal(0),
    cameraView,
    cameraAsked,
    lookFrom(view) {
      batch(() => {
        cameraView.value = view;
        cameraAsked.value++;
      });
    },
    pictureColour: signal(null),
    typedRange: signal(NOTHING_TYPED),
    explained: signal(null),
  };
}
