import { cssColour } from '../../colour/shellColours.ts';
import { paintOverlay } from '../../cone/overlay/paintOverlay.ts';
import { paintShells } from '../../cone/overlay/shellPaint.ts';
import { conePlaces, coneSetting, ensureComovingTitle } from './coneSetting.ts';
import { paintBodies } from './shellBodies.ts';
import { penOn, type ViewDrawing, type ViewInput } from './view.ts';

/** The cone as the window shows it: from the side where its radius is a ruler, or in perspective. */
export function coneView(input: ViewInput, perspective: boolean): ViewDrawing {
  const { numbers, options, theme } = input;
  const setting = coneSetting(input, (model) => {
    if (perspective) model.setView('whole');
    else if (model.view === 'sideOn' || model.view === 'parallel')
      model.setSidewaysFactor(numbers.study.look.sideways);
  });
  const { model, scene, lanes, radius } = setting;
  const under = penOn(input);
  for (const [i, shell] of scene.shells.shells.entries()) {
    const ends = [radius(shell.comovingMinMpc), radius(shell.comovingMaxMpc)] as const;
    const css = cssColour(scene.shellColours[i]!, theme.shellAlpha);
    for (const lane of lanes) paintBodies(under.pen, lane, model.aligned, ends, css);
  }
  const over = penOn(input);
  if (options.rulers) {
    paintOverlay(over.pen, scene);
    ensureComovingTitle(over, scene);
  } else paintShells(over.pen, scene);
  const fields = countText(lanes.length);
  return {
    under: under.items,
    over: over.items,
    notes: model.state().caption,
    words: perspective
      ? `a survey of ${fields} seen in perspective, the observer at the common tip`
      : `a survey of ${fields} seen from the side, the observer at the left and depth to the right`,
    ...conePlaces(setting, setting, input),
  };
}

export const countText = (fields: number): string =>
  fields === 0 ? 'the whole sky' : fields === 1 ? 'one field' : `${fields} fields`;
