import type { Light } from '../../../shared-core/study/schema.ts';
import { hexColour } from '../hexColour.ts';
import type { ColouringInput, ConeTheme } from '../types.ts';
import { palette } from './colouring.ts';
import type { Tone } from './tone.ts';

/** What a tone is made from, beside the sums of light. */
export interface ToneLook {
  readonly theme: ConeTheme;
  readonly colouring: ColouringInput;
  readonly shellCount: number;
  readonly light: Light;
}

/** Makes tones, and hands out the same one while nothing of it changes, so that its table need not be made anew. */
export class ToneSource {
  private last: { key: string; tone: Tone } | null = null;

  /** @param sums of light that fix the curve; taken in sixths of an octave, too small a step to be seen */
  tone(
    { theme, colouring, shellCount, light }: ToneLook,
    sums: { readonly full: number; readonly single: number },
  ): Tone {
    const { stretch, glow } = light;
    const brighter = 2 ** light.exposureStops;
    const full = rounded(sums.full) / brighter;
    const single = rounded(sums.single) / brighter;
    const map =
      colouring.kind === 'shell' ? `shells ${shellCount}` : `${colouring.map} ${colouring.reversed}`;
    const key = [theme.mode, theme.background, map, stretch, glow, full, single].join(' ');
    if (this.last?.key === key) return this.last.tone;
    const tone: Tone = {
      background: hexColour(theme.background),
      colours: palette(colouring, shellCount, theme.mode),
      stretch,
      full,
      single,
      glow: theme.mode === 'dark' ? [255, 250, 240] : [12, 16, 40],
      glowShare: glow,
    };
    this.last = { key, tone };
    return tone;
  }
}

const rounded = (light: number): number => 2 ** (Math.round(6 * Math.log2(light)) / 6);
