import { useEffect, useRef, useState } from 'preact/hooks';
import type { ColumnMapping } from '../../../shared-core/catalogue/catalogue.ts';
import { change } from '../../../shared-core/study/edits.ts';
import { useApp } from '../../state/app.ts';
import { setSectionOpen } from '../../ui/openSections.ts';
import { Section } from '../../ui/Section.tsx';
import { useStudyPart } from '../useStudyPart.ts';
import { MappingForm } from './MappingForm.tsx';
import { draftOf, finishDraft, fittingDraft, isGuessable, type MappingDraft } from './mappingDraft.ts';
import { PreviewDialog } from './PreviewDialog.tsx';
import { usePreview } from './usePreview.ts';

/** Which column of the catalogue is what. */
export function ColumnsSection() {
  const { studyState, engine, files } = useApp();
  const chosen = useStudyPart('mapping');
  const source = useStudyPart('source');
  const loaded = engine.loadedNow.value;
  const [looking, setLooking] = useState(false);
  // A file whose columns could not be guessed is not loaded: its header comes from the preview then.
  const unread = source !== null && loaded === null && engine.progress.value === null;
  const state = usePreview(looking || unread);
  const preview = state.kind === 'read' ? state.preview : null;
  // While the file is read again for columns just chosen, the choice stays where the hand is.
  const file = JSON.stringify(files.engineSource.value);
  const known = useRef<{ readonly file: string; readonly header: readonly string[] } | null>(null);
  const found = loaded?.header ?? preview?.header ?? null;
  if (found !== null) known.current = { file, header: found };
  const header = known.current?.file === file ? known.current.header : null;
  const mapping = chosen ?? loaded?.mapping ?? preview?.mapping ?? null;
  const [draft, setDraft] = useState<{
    draft: MappingDraft;
    of: ColumnMapping | null;
    header: string;
  } | null>(null);
  const headerKey = header?.join('\n') ?? '';
  const current =
    draft !== null && draft.of === mapping && draft.header === headerKey
      ? draft.draft
      : fittingDraft(draftOf(mapping), header ?? []);
  const finished = header === null ? null : finishDraft(current, header);
  const sentence = finished !== null && 'sentence' in finished ? finished.sentence : null;

  const onChange = (next: MappingDraft): void => {
    if (header === null) return;
    const done = finishDraft(next, header);
    if ('sentence' in done || !studyState.perform(change('Choose columns', { mapping: done.mapping })))
      setDraft({ draft: next, of: mapping, header: headerKey });
    else setDraft(null);
  };
  // A file that waits for its columns must not wait behind a folded heading.
  const waiting = unread && header !== null && sentence !== null;
  useEffect(() => {
    if (waiting) setSectionOpen('columns', true);
  }, [waiting]);
  const gist =
    source === null || header === null
      ? ''
      : sentence !== null
        ? 'to be chosen'
        : [current.ra, current.dec, current.radialColumn].join(', ');
  return (
    <Section id="columns" title="Columns" gist={gist} alert={header !== null && sentence !== null}>
      {header === null ? (
        <p class="quiet">
          {state.kind === 'refused'
            ? state.sentence
            : state.kind === 'reading' || engine.progress.value !== null
              ? 'Reading the head of the file…'
              : 'Open a catalogue to choose its columns.'}
        </p>
      ) : (
        <>
          <MappingForm header={header} draft={current} sentence={sentence} onChange={onChange} />
          <div class="actions">
            <button
              type="button"
              class="button"
              disabled={files.engineSource.value === null}
              onClick={() => setLooking(true)}
            >
              Look at 20 rows…
            </button>
            {chosen === null || source?.kind === 'demo' || !isGuessable(header) ? null : (
              <button
                type="button"
                class="button"
                title="Let the names in the header decide"
                onClick={() => studyState.perform(change('Columns by their names', { mapping: null }))}
              >
                By their names
              </button>
            )}
          </div>
        </>
      )}
      {looking ? (
        <PreviewDialog
          state={state}
          draft={current}
          sentence={sentence}
          onChange={onChange}
          onClose={() => setLooking(false)}
        />
      ) : null}
    </Section>
  );
}
