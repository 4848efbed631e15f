import type { StudySource } from '../../../shared-core/study/schema.ts';
import { useApp } from '../../state/app.ts';
import { sizeText } from '../../ui/numberText.ts';
import { revealSection } from '../../ui/openSections.ts';
import { usePreview } from '../columns/usePreview.ts';
import { notAtHand } from '../notAtHand.ts';
import { useStudyPart } from '../useStudyPart.ts';

/** The study names a file that is not at hand. */
export function SourceMissing({ source }: { readonly source: Extract<StudySource, { kind: 'file' }> }) {
  const { files } = useApp();
  return (
    <div class="trouble" role="status">
      <p>
        {notAtHand({ files })} {source.path === null ? '' : `It was at ${source.path}. `}The study has
        everything but its galaxies.
      </p>
      <button type="button" class="button" onClick={() => void files.pointAtSource()}>
        Point at it…
      </button>
    </div>
  );
}

/** The file is there, but its contents are others. */
export function SourceChanged() {
  const { engine, files } = useApp();
  const source = useStudyPart('source');
  const loaded = engine.loadedNow.value;
  if (source?.kind !== 'file' || loaded === null) return null;
  return (
    <div class="trouble" role="status">
      <p>
        “{source.name}” has changed since the study was made: {sizeText(source.sizeBytes)} then,{' '}
        {sizeText(loaded.sizeBytes)} now, other contents. The numbers shown are those of the file as it is
        now.
      </p>
      <div class="actions">
        <button type="button" class="button" onClick={() => files.acceptChanged(loaded)}>
          Go on with it
        </button>
        <button type="button" class="button" onClick={() => void files.pointAtSource()}>
          Choose another…
        </button>
      </div>
    </div>
  );
}

/** What the engine could not do, in its own sentence. */
export function ReadFailure() {
  const { engine, files, studyState } = useApp();
  const failure = engine.failure.value;
  const head = usePreview(failure?.stage === 'load');
  if (failure === null || files.missingSource.value !== null) return null;
  const before = failure.stage === 'load' ? files.lastReadable.value : null;
  return (
    <div class="trouble" role="alert">
      <p>{failure.sentence}</p>
      <div class="actions">
        <button type="button" class="button" onClick={() => engine.readAgain()}>
          Read again
        </button>
        {failure.stage === 'load' && head.kind !== 'refused' ? (
          <button type="button" class="button" onClick={() => revealSection('columns')}>
            Columns
          </button>
        ) : null}
        {before === null ? null : (
          <button type="button" class="button" onClick={() => studyState.backTo(before)}>
            Back to {catalogueName(before.source)}
          </button>
        )}
      </div>
    </div>
  );
}

function catalogueName(source: StudySource | null): string {
  if (source === null) return 'no catalogue';
  return source.kind === 'demo' ? 'the invented demo' : source.name;
}
