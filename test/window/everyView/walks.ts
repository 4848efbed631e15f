import type { Walk } from './view.ts';
import { cone } from './walks/cone.ts';
import { desk } from './walks/desk.ts';
import { films } from './walks/films.ts';
import { galaxies } from './walks/galaxies.ts';
import { million } from './walks/million.ts';
import { beyondTheAntipode, notAtHand } from './walks/notAtHand.ts';
import { offered } from './walks/offered.ts';
import { pictures } from './walks/pictures.ts';
import { plan } from './walks/plan.ts';
import { questions } from './walks/questions.ts';
import { reading } from './walks/reading.ts';
import { shapley } from './walks/shapley.ts';
import { small } from './walks/small.ts';
import { strip } from './walks/strip.ts';
import { wholeSky } from './walks/wholeSky.ts';
import { worth } from './walks/worth.ts';

/** Every view of the window but those of the long walks. */
export const WALKS: readonly Walk[] = [
  cone,
  galaxies,
  strip,
  desk,
  worth,
  pictures,
  questions,
  offered,
  plan,
  notAtHand,
  beyondTheAntipode,
  reading,
  small,
  shapley,
  wholeSky,
];

/** Reason why they are not gone with every `npm test`: a minute and a half, and ten minutes are all there is for it. */
export const LONG_WALKS: readonly Walk[] = [films, million];
