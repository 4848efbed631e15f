import { useEffect } from 'preact/hooks';
import { useApp } from '../../state/app.ts';
import { sizeText } from '../../ui/numberText.ts';
import { setSectionOpen } from '../../ui/openSections.ts';
import { Section } from '../../ui/Section.tsx';
import { useStudyPart } from '../useStudyPart.ts';
import { RowsAccount } from './RowsAccount.tsx';
import { ReadFailure, SourceChanged, SourceMissing } from './SourceTroubles.tsx';
import { sourceChanged } from './sourceFacts.ts';

/** The catalogue: which file, what became of its rows, and what is wrong with it. */
export function SourceSection() {
  const { engine, files } = useApp();
  const source = useStudyPart('source');
  const loaded = engine.loadedNow.value;
  const missing = files.missingSource.value;
  const changed = sourceChanged(source, loaded);
  const trouble = missing !== null || changed || engine.failure.value !== null;
  // What the study waits for must not wait behind a folded heading.
  useEffect(() => {
    if (missing !== null) setSectionOpen('source', true);
  }, [missing !== null]);
  const gist = source === null ? 'none' : source.kind === 'demo' ? 'invented demo' : source.name;
  return (
    <Section id="source" title="Source" gist={trouble ? 'look here' : gist} alert={trouble} openAtFirst>
      {source === null ? (
        <NoSource />
      ) : (
        <>
          {source.kind === 'demo' ? (
            <p class="source-name">
              Invented demo survey
              <span class="quiet"> made by code from seed {source.seed}; no real sky is meant</span>
            </p>
          ) : (
            <p class="source-name" {...(source.path === null ? {} : { title: source.path })}>
              {source.name}
              <span class="quiet"> {sizeText(loaded?.sizeBytes ?? source.sizeBytes)}</span>
            </p>
          )}
          {missing === null ? null : <SourceMissing source={missing} />}
          {changed ? <SourceChanged /> : null}
          <ReadFailure />
          <RowsAccount />
          <div class="actions">
            <button type="button" class="button" onClick={() => void files.open('catalogue')}>
              {source.kind === 'demo' ? 'Open your catalogue…' : 'Open another…'}
            </button>
          </div>
        </>
      )}
    </Section>
  );
}

/** The empty state: what to do first. */
function NoSource() {
  const { files } = useApp();
  return (
    <div class="empty">
      <p>
        No catalogue is open. Open or drop a table of galaxies with right ascension, declination and redshift
        (CSV or TSV, also gzipped), or plan without one: set a region and shells.
      </p>
      <div class="actions">
        <button type="button" class="button accent-button" onClick={() => void files.open('catalogue')}>
          Open a catalogue…
        </button>
        <button type="button" class="button" onClick={() => void files.openDemo()}>
          Look at the invented demo
        </button>
      </div>
    </div>
  );
}
