import { type Light, USUAL_LIGHT } from '../../shared-core/study/schema.ts';
import type { Triple } from '../colour/oklab.ts';
import { shellColours } from '../colour/shellColours.ts';
import type { LayerLook } from './coneLayers.ts';
import type { ToneLook } from './points/toneSource.ts';
import { DARK } from './theme.ts';
import type { ColouringInput, ConeTheme, RadialScaleInput, ShellsInput } from './types.ts';

/** How the cone looks: colours, light, shells, rulers and marks, as they were last asked for. */
export class ConeLook {
  theme: ConeTheme = DARK;
  colouring: ColouringInput = { kind: 'radius', map: 'harbour' };
  light: Light = USUAL_LIGHT;
  shells: ShellsInput = { shells: [], selected: null, hovered: null };
  scale: RadialScaleInput | null = null;
  /** Rows of the galaxies with rings, and the text of the line between the first two. */
  picked: readonly number[] = [];
  pairText = '';
  /** Rises when the points look different. */
  version = 0;
  private colours: readonly Triple[] = [];

  setTheme(theme: ConeTheme): void {
    this.theme = theme;
    this.colours = shellColours(this.shells.shells.length, theme.mode);
    this.version++;
  }

  setColouring(colouring: ColouringInput): void {
    this.colouring = colouring;
    this.version++;
  }

  setLight(light: Light): void {
    this.light = light;
    this.version++;
  }

  setShells(shells: ShellsInput): void {
    if (shells.shells !== this.shells.shells) {
      this.colours = shellColours(shells.shells.length, this.theme.mode);
      if (this.colouring.kind === 'shell') this.version++;
    }
    this.shells = shells;
  }

  ofPoints(): ToneLook {
    const { theme, colouring, light } = this;
    return { theme, colouring, light, shellCount: this.shells.shells.length };
  }

  /** @param hovered row of the galaxy under the pointer */
  overPoints(hovered: number | null): LayerLook {
    const { theme, scale, shells, colours, picked, pairText } = this;
    return { theme, scale, shells, colours, hovered, picked, pairText };
  }
}
