import { Refusal } from '../../../shared-core/base/refusal.ts';
import type { Cut } from '../../../shared-core/catalogue/catalogue.ts';
import { checkCuts } from '../../../shared-core/catalogue/selection.ts';
import { change } from '../../../shared-core/study/edits.ts';
import { useApp } from '../../state/app.ts';
import { ChoiceField } from '../../ui/ChoiceField.tsx';
import { focusSoon } from '../../ui/focusSoon.ts';
import { IconButton } from '../../ui/IconButton.tsx';
import { NumberField } from '../../ui/NumberField.tsx';
import { countText } from '../../ui/numberText.ts';
import { Section } from '../../ui/Section.tsx';
import { useStudyPart } from '../useStudyPart.ts';

const MOST_CUTS = 200;
const ADD_ID = 'add-cut';

/** Rows kept only where a column lies between two bounds. */
export function CutsSection() {
  const { studyState, engine } = useApp();
  const cuts = useStudyPart('cuts');
  const loaded = engine.loadedNow.value;
  const header = (loaded?.header ?? []).filter((name) => name !== '');
  const cutCounts = engine.selected.value?.cutCounts ?? [];
  const outside = engine.selected.value?.account.reasons.outsideCuts ?? 0;

  const put = (next: readonly Cut[], label: string): string | null => {
    try {
      checkCuts(next);
    } catch (error) {
      if (error instanceof Refusal) return error.message;
      throw error;
    }
    studyState.perform(change(label, { cuts: [...next] }));
    return null;
  };
  const add = (): void => {
    const { magnitude, radial } = loaded!.mapping;
    const column = magnitude ?? radial.column;
    put([...cuts, { column, min: null, max: null }], `Add a cut on ${column}`);
  };
  const gist = cuts.length === 0 ? 'none' : `${cuts.length}, ${countText(outside)} rows outside`;
  return (
    <Section id="cuts" title="Cuts" gist={gist}>
      <ul class="cuts" aria-label="Cuts">
        {cuts.map((cut, i) => (
          <li key={i} class="cut" aria-label={`Cut ${i + 1}, on ${cut.column}`}>
            <ChoiceField
              label="column"
              value={cut.column}
              choices={[...new Set([cut.column, ...header])].map((name) => ({ value: name, label: name }))}
              onChoose={(column) => put(cuts.with(i, { column, min: null, max: null }), `Cut on ${column}`)}
            />
            <NumberField
              label="from"
              value={cut.min}
              optional
              onCommit={(min) => put(cuts.with(i, { ...cut, min }), `Cut on ${cut.column}`)}
            />
            <NumberField
              label="to"
              value={cut.max}
              optional
              onCommit={(max) => put(cuts.with(i, { ...cut, max }), `Cut on ${cut.column}`)}
            />
            <IconButton
              icon="close"
              label={`Remove the cut on ${cut.column}`}
              onClick={() => {
                put(cuts.toSpliced(i, 1), `Remove the cut on ${cut.column}`);
                focusSoon(ADD_ID);
              }}
            />
            {cuts.length > 1 ? <p class="quiet cut-count">{countText(cutCounts[i] ?? 0)} set aside</p> : null}
          </li>
        ))}
      </ul>
      {cuts.length === 0 ? (
        <p class="quiet">Every usable row inside the region is kept.</p>
      ) : (
        <p class="quiet" role="status">
          {countText(outside)} {outside === 1 ? 'row is' : 'rows are'} set aside by{' '}
          {cuts.length === 1 ? 'it' : 'them'}. Bounds are included; one that is left empty is open; rows
          without a number fail a bound.
        </p>
      )}
      <div class="actions">
        <button
          type="button"
          id={ADD_ID}
          class="button"
          disabled={loaded === null || cuts.length >= MOST_CUTS}
          onClick={add}
        >
          Add a cut
        </button>
      </div>
    </Section>
  );
}
