import { filmFrames } from '../../../shared-core/picture/film.ts';
import { SliderField } from '../../ui/SliderField.tsx';
import type { FilmMoment } from './benchMessages.ts';

/** Which moment of a film the preview shows. */
export function MomentField({
  moment: { film, frame },
  onFrame,
}: {
  readonly moment: FilmMoment;
  readonly onFrame: (frame: number) => void;
}) {
  const seconds = (frames: number): string => (frames / film.framesPerSecond).toFixed(1);
  const frames = filmFrames(film);
  return (
    <SliderField
      label="Moment"
      min={0}
      max={frames - 1}
      step={1}
      value={frame}
      words={`${seconds(frame)} of ${seconds(frames)} s`}
      onInput={onFrame}
    />
  );
}
