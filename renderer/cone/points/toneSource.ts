import { parseCssColour } from '../cssColour.ts';
import type { ColouringInput, ConeTheme } from '../types.ts';
import { palette } from './colouring.ts';
import type { Stretch, Tone } from './tone.ts';

/** Makes tones, and hands out the same one while nothing of it changes, so that its table need not be made anew. */
export class ToneSource {
  private last: { key: string; tone: Tone } | null = null;

  /** @param full the sum of light at full strength; taken in sixths of an octave, too small a step to be seen */
  tone(
    theme: ConeTheme,
    colouring: ColouringInput,
    shellCount: number,
    stretch: Stretch,
    full: number,
  ): Tone {
    const rounded = 2 ** (Math.round(6 * Math.log2(full)) / 6);
    const map =
      colouring.kind === 'shell' ? `shells ${shellCount}` : `${colouring.map} ${colouring.reversed}`;
    const key = [theme.mode, theme.background, map, stretch, rounded].join(' ');
    if (this.last?.key === key) return this.last.tone;
    const tone: Tone = {
      background: parseCssColour(theme.background),
      colours: palette(colouring, shellCount, theme.mode),
      stretch,
      full: rounded,
      single: 1,
      glow: theme.mode === 'dark' ? [255, 250, 240] : [12, 16, 40],
    };
    this.last = { key, tone };
    return tone;
  }
}
