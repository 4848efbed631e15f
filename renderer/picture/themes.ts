import type { Triple } from '../colour/oklab.ts';
import type { ConeTheme } from '../cone/types.ts';
import { readColour } from './colourText.ts';
import { FONT_FAMILY } from './text/measure.ts';

/** Colours of a style; the glow is what the brightest places turn toward. */
export interface PictureTheme extends ConeTheme {
  readonly glow: Triple;
  /** Opacity of the shells' bodies. */
  readonly shellAlpha: number;
  /** What suits the ground beside the data's own exposure: single galaxies fade sooner into white than into black. */
  readonly exposureStops: number;
}

const DARK: PictureTheme = {
  mode: 'dark',
  background: '#06090d',
  ink: '#edf1f2',
  inkMuted: '#a6b2b7',
  line: '#46535a',
  accent: '#6fd1c3',
  fontFamily: FONT_FAMILY,
  glow: [255, 250, 240],
  shellAlpha: 0.075,
  exposureStops: 0.6,
};

const PAPER: PictureTheme = {
  mode: 'light',
  background: '#ffffff',
  ink: '#15191b',
  inkMuted: '#4d575a',
  line: '#a3abad',
  accent: '#0b6b68',
  fontFamily: FONT_FAMILY,
  glow: [12, 16, 40],
  shellAlpha: 0.075,
  exposureStops: 1,
};

export const pictureTheme = (style: 'dark' | 'paper'): PictureTheme => (style === 'dark' ? DARK : PAPER);

export const groundOf = (theme: ConeTheme): Triple => readColour(theme.background).colour;
