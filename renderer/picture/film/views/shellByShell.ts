import { Refusal } from '../../../../shared-core/base/refusal.ts';
import { rankBelow } from '../../../../shared-core/shells/sample.ts';
import { cssColour } from '../../../colour/shellColours.ts';
import { paintOverlay } from '../../../cone/overlay/paintOverlay.ts';
import { paintShells } from '../../../cone/overlay/shellPaint.ts';
import { sideText, surveyText } from '../../views/cone.ts';
import { conePlaces, coneSetting, ensureComovingTitle } from '../../views/coneSetting.ts';
import { paintAllBodies } from '../../views/shellBodies.ts';
import { penOn, type ViewInput } from '../../views/view.ts';
import { shellLights } from '../paths.ts';
import type { FilmView } from './filmView.ts';
import { SHELL_NUMBERS_HEIGHT, shellNumbersWriter } from './shellNumbers.ts';

/** Light of what is not lit: enough to see where the lit shell lies. */
const DIM_LIGHT = 0.06;
const DIM_BODY = 0.35;
const LIT_BODY = 2.2;
const DIM_LINE = 0.4;

/** The cone from the side, each shell lit in turn with its numbers above. */
export function shellByShellView(whole: ViewInput): FilmView {
  const { numbers, options, theme } = whole;
  const { box } = whole;
  if (numbers.shells.length === 0)
    throw new Refusal(
      'A film shell by shell needs shells, and the study has none: give shell edges, and a region or a catalogue.',
    );
  const input: ViewInput = {
    ...whole,
    box: { ...box, top: box.top + SHELL_NUMBERS_HEIGHT, height: box.height - SHELL_NUMBERS_HEIGHT },
  };
  const setting = coneSetting(input, (model) => {
    if (model.view === 'sideOn' || model.view === 'parallel')
      model.setSidewaysFactor(numbers.study.look.sideways);
  });
  const { model, scene, lanes, radius } = setting;
  const count = numbers.shells.length;
  const rulers = penOn(input);
  if (options.rulers) {
    const bare = { ...scene, shells: { ...scene.shells, shells: [] } };
    paintOverlay(rulers.pen, bare);
    ensureComovingTitle(rulers, bare);
  }
  const writeNumbers = shellNumbersWriter(numbers);
  const places = conePlaces(setting, setting, input);
  return {
    notes: [...model.state().caption, 'each shell is lit in turn'],
    words: `${surveyText(lanes)} ${sideText(model)}, each of its ${count} shells lit in turn with its numbers`,
    drawingAt(share) {
      const lights = shellLights(share, count);
      /** 0 dim, 1 as in a picture or lit alone. */
      const lit = (i: number): number => lights.all + lights.shells[i]!;
      const under = penOn(input);
      const over = penOn(input);
      paintAllBodies(under.pen, numbers.shellInputs, lanes, model.aligned, radius, (i) => {
        const body = lights.all + LIT_BODY * lights.shells[i]! + DIM_BODY * (1 - lit(i));
        return cssColour(scene.shellColours[i]!, theme.shellAlpha * body);
      });
      for (const [i, shell] of numbers.shellInputs.entries()) {
        over.pen.context.globalAlpha = DIM_LINE + (1 - DIM_LINE) * lit(i);
        paintShells(over.pen, {
          ...scene,
          shells: { shells: [shell], selected: null, hovered: null },
          shellColours: [scene.shellColours[i]!],
        });
      }
      const words = penOn(whole);
      for (const [i, shell] of numbers.shells.entries()) {
        // One shell's numbers are gone before the next one's come.
        const alpha = Math.max(0, 2 * lights.shells[i]! - 1);
        words.pen.context.globalAlpha = alpha;
        if (alpha > 0) writeNumbers(words.pen, shell, cssColour(scene.shellColours[i]!));
      }
      return {
        under: under.items,
        over: [...over.items, ...rulers.items, ...words.items],
        dim: (light) => dimGalaxies(light, whole, lights.all, lit),
        ...places,
      };
    },
  };
}

/** Galaxies of lit shells keep their light, the others become dim; sorted by redshift, a shell is a run of them. */
function dimGalaxies(
  light: Float32Array,
  { numbers }: ViewInput,
  all: number,
  lit: (shell: number) => number,
): void {
  const { selected } = numbers.facts;
  if (!selected) return;
  const share = (of: number): number => DIM_LIGHT + (1 - DIM_LIGHT) * of;
  const shares = new Float32Array(light.length).fill(share(all));
  for (const [i, { zMin, zMax }] of numbers.shells.entries()) {
    const last = i === numbers.shells.length - 1;
    shares.fill(share(lit(i)), rankBelow(selected.sample, zMin), rankBelow(selected.sample, zMax, last));
  }
  for (let i = 0; i < light.length; i++) light[i]! *= shares[i]!;
}
