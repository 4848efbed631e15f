/*
 * What moves in a film, as functions of how far the film is (0..1). Nothing else of a frame depends on time, so that a
 * frame is the same wherever it is asked for.
 */

/** Angle of a turntable, radians: one whole turn, and exactly the first angle again at 1. */
export const turnRadians = (share: number): number => 2 * Math.PI * (share % 1);

/** Share of a flight in which it gathers speed, and again in which it loses it. */
const EASED = 0.15;

/**
 * How much of its way a flight has behind it: it gathers speed evenly, flies on at one speed, and comes to rest evenly.
 * Rises from 0 to 1 and never falls.
 */
export function flownShare(share: number): number {
  const top = 1 / (1 - EASED);
  if (share <= EASED) return (top * share * share) / (2 * EASED);
  if (share >= 1 - EASED) return 1 - (top * (1 - share) * (1 - share)) / (2 * EASED);
  return top * (share - EASED / 2);
}

/** How brightly each shell is lit, and how much of the light is shared by all: together they are 1. */
export interface ShellLights {
  readonly shells: readonly number[];
  readonly all: number;
}

/** Half of the time in which one light takes over from another, in turns of a shell. */
const FADE = 0.14;
/** Turns before the first shell and after the last in which everything is lit. */
const OPENING = 0.5;

/** Each of `count` shells is lit for the same time, near to far, between an opening and an end with all lit. */
export function shellLights(share: number, count: number): ShellLights {
  const turn = share * (count + 2 * OPENING) - OPENING;
  /** 0 before the change at a turn, 1 after it. */
  const after = (at: number): number => {
    const t = Math.min(1, Math.max(0, (turn - at + FADE) / (2 * FADE)));
    return t * t * (3 - 2 * t);
  };
  return {
    shells: Array.from({ length: count }, (_, i) => after(i) - after(i + 1)),
    all: count === 0 ? 1 : 1 - after(0) + after(count),
  };
}
