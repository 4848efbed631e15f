import { parseCssColour } from '../cssColour.ts';
import type { ColouringInput, ConeTheme } from '../types.ts';
import { palette } from './colouring.ts';
import type { Stretch, Tone } from './tone.ts';

/** Makes tones, and hands out the same one while nothing of it changes, so that its table need not be made anew. */
export class ToneSource {
  private last: { key: string; tone: Tone } | null = null;

  /** @param light sums that fix the curve; taken in sixths of an octave, too small a step to be seen */
  tone(
    theme: ConeTheme,
    colouring: ColouringInput,
    shellCount: number,
    stretch: Stretch,
    light: { readonly full: number; readonly single: number },
  ): Tone {
    const full = rounded(light.full);
    const single = rounded(light.single);
    const map =
      colouring.kind === 'shell' ? `shells ${shellCount}` : `${colouring.map} ${colouring.reversed}`;
    const key = [theme.mode, theme.background, map, stretch, full, single].join(' ');
    if (this.last?.key === key) return this.last.tone;
    const tone: Tone = {
      background: parseCssColour(theme.background),
      colours: palette(colouring, shellCount, theme.mode),
      stretch,
      full,
      single,
      glow: theme.mode === 'dark' ? [255, 250, 240] : [12, 16, 40],
    };
    this.last = { key, tone };
    return tone;
  }
}

const rounded = (light: number): number => 2 ** (Math.round(6 * Math.log2(light)) / 6);
