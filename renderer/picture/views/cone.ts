import { cssColour } from '../../colour/shellColours.ts';
import type { ConeModel } from '../../cone/coneModel.ts';
import { paintOverlay } from '../../cone/overlay/paintOverlay.ts';
import type { PaintedLane } from '../../cone/overlay/scene.ts';
import { paintShells } from '../../cone/overlay/shellPaint.ts';
import { conePlaces, coneSetting, ensureComovingTitle } from './coneSetting.ts';
import { paintAllBodies } from './shellBodies.ts';
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
  paintAllBodies(under.pen, scene.shells.shells, lanes, model.aligned, radius, (i) =>
    cssColour(scene.shellColours[i]!, theme.shellAlpha),
  );
  const over = penOn(input);
  if (options.rulers) {
    paintOverlay(over.pen, scene);
    ensureComovingTitle(over, scene);
  } else paintShells(over.pen, scene);
  return {
    under: under.items,
    over: over.items,
    notes: model.state().caption,
    words: perspective
      ? `${surveyText(lanes)} seen in perspective, the observer at the common tip`
      : `${surveyText(lanes)} ${sideText(model)}`,
    ...conePlaces(setting, setting, input),
  };
}

/** What is seen: the lanes of a whole sky have no outline. */
export function surveyText(lanes: readonly PaintedLane[]): string {
  if (lanes.every(({ shape }) => shape.rings.length === 0)) return 'a survey of the whole sky';
  return `a survey of ${lanes.length === 1 ? 'one field' : `${lanes.length} fields`}`;
}

/** From where it is seen, when not in perspective. */
export const sideText = ({ view }: Pick<ConeModel, 'view'>): string =>
  view === 'aroundTheObserver'
    ? 'seen around the observer, depth outward'
    : 'seen from the side, the observer at the left and depth to the right';
