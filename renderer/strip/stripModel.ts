import { computed, type ReadonlySignal, type Signal, signal } from '@preact/signals';
import { Refusal } from '../../shared-core/base/refusal.ts';
import { formatNumber, UNITS } from '../../shared-core/report/quantity.ts';
import { densityProfile } from '../../shared-core/shells/profile.ts';
import { WHOLE_SKY_DEG2 } from '../../shared-core/shells/statistics.ts';
import type { App } from '../state/app.ts';
import { unitText } from '../ui/unitText.ts';
import { type Bins, binsOf, SMOOTHING_BINS } from './bins.ts';
import { type DensityScale, densityScale, proposedUpward, type Upward } from './densityScale.ts';
import { type RadialPixel, type RedshiftWindow, radialPixel, shownWindow, wholeWindow } from './layout.ts';
import { drawnAxis, type Reading, type Readings, readingsOf } from './readings.ts';

/** Sizes of the strip's drawing in CSS pixels. */
export interface StripSize {
  readonly widthPx: number;
  readonly heightPx: number;
  /** Size of the small type. */
  readonly fontPx: number;
}

/** The histogram in shown units. */
export interface ShownProfile {
  readonly bins: Bins;
  readonly count: Float64Array;
  readonly density: Float64Array;
  readonly smooth: Float64Array;
  /** Null while there is no area: then density is galaxies per bin. */
  readonly power: Float64Array | null;
  readonly unit: string;
  /** A curve through a handful of galaxies would show the smoothing and nothing else. */
  readonly hasCurve: boolean;
}

const FEWEST_FOR_CURVE = 20;

/** What the parts of the strip share. An edge moved changes none of it but through the study. */
export interface StripModel {
  readonly size: Signal<StripSize | null>;
  readonly readings: ReadonlySignal<Readings>;
  /** The reading that the strip is linear in. */
  readonly primary: ReadonlySignal<Reading>;
  readonly window: ReadonlySignal<RedshiftWindow>;
  /** Null until the strip has been laid out. */
  readonly scale: ReadonlySignal<RadialPixel | null>;
  /** Null without galaxies, and where they have no density. */
  readonly profile: ReadonlySignal<ShownProfile | null>;
  /** Why the galaxies in view have no density; null where they have one. */
  readonly trouble: ReadonlySignal<string | null>;
  /** Width of a bin in the shown reading: the step of the reading cursor. */
  readonly binStep: ReadonlySignal<number>;
  readonly density: ReadonlySignal<DensityScale>;
  /** n P0 for a shown density; null while there is no area. */
  readonly powerPerDensity: ReadonlySignal<number | null>;
  /** What the person chose; null takes the proposal. */
  readonly chosenUpward: Signal<Upward | null>;
  readonly upward: ReadonlySignal<Upward>;
  /** Pixel column that the pointer or the reading cursor is at; null when nothing is read. */
  readonly readPx: Signal<number | null>;
  readonly snap: ReadonlySignal<boolean>;
  /** The edge whose values are shown: dragged, focused or pointed at. */
  readonly spokenEdge: Signal<number | null>;
  /** The small form that takes a typed value: for an edge, or for a new edge at a redshift. */
  readonly typing: Signal<Typing | null>;
}

export type Typing =
  | { readonly kind: 'move'; readonly index: number; readonly z: number }
  | { readonly kind: 'add'; readonly z: number };

export function createStripModel({ derived, view, studyState }: App): StripModel {
  const { cosmology, sample, conditions, units, deepestRedshift } = derived;
  const size = signal<StripSize | null>(null);
  const chosenUpward = signal<Upward | null>(null);
  const kind = computed(() => studyState.study.value.look.radial);
  const axis = computed(() => drawnAxis(kind.value, cosmology.value));
  const readings = computed(() => readingsOf(cosmology.value, units.value));
  const primary = computed(() => readings.value[kind.value]);
  const window = computed(() => shownWindow(view.redshiftWindow.value, axis.value, deepestRedshift.value));
  const widthPx = computed(() => size.value?.widthPx ?? null);
  const scale = computed(() =>
    widthPx.value === null ? null : radialPixel(axis.value, window.value, widthPx.value),
  );
  const perMpc3 = computed(() => (units.value.perH ? units.value.h ** UNITS.perMpc3.lengthPower : 1));

  const profileOver = (at: RadialPixel, range: RedshiftWindow): ShownProfile => {
    const bins = binsOf(at, range, primary.value.factor, sample.value);
    // Without an area galaxies can be counted all the same; the density of the whole sky is thrown away then.
    const known = conditions.value;
    const counted = known ?? { cosmology: cosmology.value, areaDeg2: WHOLE_SKY_DEG2, p0Mpc3PerH3: 1 };
    const profile = densityProfile(sample.value, bins.zEdges, SMOOTHING_BINS, counted);
    const { count } = profile;
    const hasCurve = sample.value.count >= FEWEST_FOR_CURVE;
    if (known === null)
      return { bins, count, density: count, smooth: count, power: null, unit: '', hasCurve: false };
    const shown = perMpc3.value;
    return {
      bins,
      count,
      density: profile.densityPerMpc3.map((n) => n * shown),
      smooth: profile.smoothPerMpc3.map((n) => n * shown),
      power: profile.power,
      unit: unitText(UNITS.perMpc3.plain[units.value.perH ? 1 : 0]),
      hasCurve,
    };
  };
  // Galaxies beyond the far side of a strongly closed universe have no density: no curve, but the sentence that says so.
  const profileOrWhy = (at: RadialPixel, range: RedshiftWindow): ShownProfile | string => {
    try {
      return profileOver(at, range);
    } catch (error) {
      if (!(error instanceof Refusal)) throw error;
      const { antipodeMpc } = cosmology.value;
      if (!Number.isFinite(antipodeMpc)) return error.message;
      const { factor, unit } = readings.value.comoving;
      const end = formatNumber(antipodeMpc * factor, { significant: 4 });
      return `This closed universe ends (at its antipode) ${end} ${unit} away, nearer than some galaxies in view, and no density is drawn: zoom in, or choose less curvature.`;
    }
  };
  const drawn = computed(() =>
    scale.value === null || sample.value.count === 0 ? null : profileOrWhy(scale.value, window.value),
  );
  const profile = computed(() => (typeof drawn.value === 'string' ? null : drawn.value));
  const seen = ({ bins, count, density }: ShownProfile) => ({
    count,
    density,
    first: bins.first,
    end: bins.end,
  });
  const p0Mpc3 = computed(() =>
    conditions.value === null ? null : conditions.value.p0Mpc3PerH3 / cosmology.value.h ** 3,
  );
  const powerPerDensity = computed(() => (p0Mpc3.value === null ? null : p0Mpc3.value / perMpc3.value));
  // Proposed from the whole depth, so that zooming does not switch it.
  const upward = computed<Upward>(() => {
    if (chosenUpward.value !== null) return chosenUpward.value;
    if (widthPx.value === null || sample.value.count === 0) return 'linear';
    const all = wholeWindow(axis.value, deepestOf(sample.value));
    const whole = profileOrWhy(radialPixel(axis.value, all, widthPx.value), all);
    return typeof whole === 'string' ? 'linear' : proposedUpward(seen(whole));
  });
  return {
    size,
    readings,
    primary,
    window,
    scale,
    profile,
    trouble: computed(() => (typeof drawn.value === 'string' ? drawn.value : null)),
    binStep: computed(() => {
      if (profile.value !== null) return profile.value.bins.step;
      return scale.value === null
        ? 1
        : binsOf(scale.value, window.value, primary.value.factor, sample.value).step;
    }),
    density: computed(() => {
      const noise = powerPerDensity.value === null ? null : 1 / powerPerDensity.value;
      const bins =
        profile.value === null ? { count: [], density: [], first: 0, end: 0 } : seen(profile.value);
      return densityScale(bins, upward.value, noise);
    }),
    powerPerDensity,
    chosenUpward,
    upward,
    readPx: signal(null),
    snap: computed(() => studyState.study.value.look.snap),
    spokenEdge: signal(null),
    typing: signal(null),
  };
}

function deepestOf({ redshift, count }: { redshift: Float64Array; count: number }): number {
  const deepest = redshift[count - 1]!;
  return deepest > 0 ? deepest : 1;
}
