import { separation } from '../cone/geometry/separation.ts';
import type { App } from '../state/app.ts';

/** Where the i-th galaxy by redshift stands. */
export function galaxyPlace({ engine, derived }: App, index: number) {
  const selected = engine.selected.value;
  const redshift = selected?.sample.redshift[index];
  if (selected == null || redshift === undefined) return null;
  return {
    raDeg: selected.raDeg[index]!,
    decDeg: selected.decDeg[index]!,
    redshift,
    comovingMpc: derived.cosmology.value.comovingMpc(redshift),
  };
}

/** The comoving separation of the two galaxies pointed at, in the units shown; null unless there are two. */
export function pickedSeparation(app: App) {
  const [a, b] = app.view.pickedGalaxies.value.map((i) => galaxyPlace(app, i));
  return a == null || b == null ? null : separation(a, b);
}

/** A short text for the line between them. */
export function separationText(app: App): string {
  const found = pickedSeparation(app);
  if (found === null) return '';
  const { perH, h } = app.derived.units.value;
  const shown = found.totalMpc * (perH ? h : 1);
  return `${shown.toPrecision(4)} ${perH ? 'Mpc/h' : 'Mpc'}`;
}
