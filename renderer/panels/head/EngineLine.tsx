import type { Stage } from '../../engine/protocol.ts';
import { useApp } from '../../state/app.ts';
import { countText } from '../../ui/numberText.ts';

const STAGE_TEXTS: Readonly<Record<Stage, string>> = {
  load: 'Reading the catalogue',
  select: 'Selecting galaxies',
  background: 'Computing distances',
  density: 'Measuring local density',
  columns: 'Reading the column of the colours',
};

/** What the engine is at; at rest, the rows that it kept and set aside. */
export function EngineLine() {
  const app = useApp();
  const { engine, files } = app;
  const progress = engine.progress.value;
  const account = engine.selected.value?.account ?? engine.loaded.value?.account ?? null;
  // A file that was found missing in the midst of it is not being read any more.
  if (progress !== null && files.missingSource.value === null) {
    const { stage, fraction } = progress;
    const percent = fraction === null ? null : Math.floor(100 * fraction);
    return (
      <span class="engine-line">
        {STAGE_TEXTS[stage]}
        {percent === null ? '…' : ` ${percent} %`}
        <progress
          class="engine-bar"
          aria-label={STAGE_TEXTS[stage]}
          max={1}
          {...(fraction === null ? {} : { value: fraction })}
        />
        {stage === 'load' && files.engineSource.value?.kind === 'url' ? (
          <button
            type="button"
            class="button cancel-reading"
            title="Stop reading; what was open before stays (Escape)"
            onClick={() => app.cancelReading()}
          >
            Cancel
          </button>
        ) : null}
      </span>
    );
  }
  return (
    <span class="engine-line">
      {account === null
        ? files.missingSource.value !== null
          ? 'catalogue not at hand'
          : engine.failure.value === null
            ? 'no catalogue'
            : 'catalogue not read'
        : `${countText(account.kept)} kept · ${countText(account.setAside)} set aside`}
    </span>
  );
}
