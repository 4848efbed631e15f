import type { GalaxyHit } from '../cone/types.ts';

/** The galaxies pointed out, where they stand: the first, and the one that it is measured to. */
export type Picks = readonly GalaxyHit[];

/** The same galaxies where they stand by now; one that is out of sight is left where it was. */
export function picksMoved(picks: Picks, places: readonly GalaxyHit[]): Picks {
  return picks.map((pick) => places.find(({ index }) => index === pick.index) ?? pick);
}

/**
 * What is pointed out after a click.
 * @param second whether the click means a second galaxy, to be measured to
 */
export function picksAfter(picks: Picks, hit: GalaxyHit | null, second: boolean): Picks {
  const [first] = picks;
  if (!second || first === undefined) return hit === null ? [] : [hit];
  return hit === null || hit.index === first.index ? picks : [first, hit];
}
