import { type Signal, signal } from '@preact/signals';
import type { App } from '../../state/app.ts';
import { FIRST_CHOICES, type LabelDraft, type PictureChoices } from './pictureChoices.ts';

const kept = new Map<string, Signal<PictureChoices>>();

/** What was chosen for this catalogue: it stands again when the bench is opened again. */
export function choicesFor(app: App): Signal<PictureChoices> {
  const key = JSON.stringify(app.studyState.study.peek().source);
  const found = kept.get(key) ?? signal(FIRST_CHOICES);
  kept.set(key, found);
  return found;
}

/** A label to begin with: at the galaxy pointed at, else at one in the middle of the survey's depth. */
export function freshLabel({ engine, view, studyState }: App, index: number): LabelDraft {
  const selected = engine.selected.peek();
  const text = `Label ${index + 1}`;
  const count = selected?.sample.count ?? 0;
  if (selected === null || count === 0)
    return {
      raDeg: '0',
      decDeg: '0',
      redshift: String(studyState.study.peek().edges.at(-1) ?? 0),
      text,
    };
  const i = view.pickedGalaxies.peek()[0] ?? count >> 1;
  const digits = (value: number): string => String(Number(value.toFixed(4)));
  return {
    raDeg: digits(selected.raDeg[i]!),
    decDeg: digits(selected.decDeg[i]!),
    redshift: digits(selected.sample.redshift[i]!),
    text,
  };
}
