import { useId, useLayoutEffect, useRef, useState } from 'preact/hooks';
import type { SkyShape } from '../../../shared-core/sky/region.ts';
import { useApp } from '../../state/app.ts';
import { DraftField } from '../../ui/DraftField.tsx';
import { Segments } from '../../ui/Segments.tsx';
import { DRAFT_FIELDS, type DraftTrouble, finishShape, type ShapeDraft } from './shapeDraft.ts';

const LONGEST_FILE_BYTES = 20_000_000;
const TITLES = { wholeSky: 'Whole sky', box: 'Box', cap: 'Cap', polygon: 'Polygon' } as const;

/** A form for one shape of the region, by numbers or by text. */
export function ShapeEditor(props: {
  readonly draft: ShapeDraft;
  readonly list: 'parts' | 'holes';
  /** Whether a hole would have anything to be a hole of. */
  readonly holePossible: boolean;
  readonly isNew: boolean;
  readonly onChange: (draft: ShapeDraft, list: 'parts' | 'holes') => void;
  /** Answers why the region cannot take the shapes; null when it did, or when the signal was raised. */
  readonly onApply: (shapes: readonly SkyShape[], signal: AbortSignal) => Promise<string | null>;
  readonly onCancel: () => void;
}) {
  const { draft, list, holePossible, isNew, onChange, onApply, onCancel } = props;
  const [trouble, setTrouble] = useState<DraftTrouble | null>(null);
  const form = useRef<HTMLFormElement>(null);
  useLayoutEffect(() => {
    form.current?.querySelector<HTMLElement>('input:not([type=radio]), textarea, button')?.focus();
    form.current?.scrollIntoView({ block: 'nearest' });
  }, []);
  const { engine, notices } = useApp();
  /** What the engine is being asked; null while it is not. */
  const asking = useRef<AbortController | null>(null);
  const giveUpAsking = (): void => {
    asking.current?.abort();
    asking.current = null;
  };
  const put = (next: ShapeDraft, to = list): void => {
    // The answer on its way is about the draft of before.
    giveUpAsking();
    setTrouble(null);
    onChange(next, to);
  };
  const cancel = (): void => {
    giveUpAsking();
    onCancel();
  };
  const apply = async (): Promise<void> => {
    // Once is enough: a second press while the engine looks at the shapes would add them twice.
    if (asking.current !== null) return;
    const asked = new AbortController();
    asking.current = asked;
    const trouble = await troubleOf(asked.signal);
    if (asked.signal.aborted) return;
    asking.current = null;
    if (trouble === null) return;
    // An undo may have taken the form away meanwhile.
    if (form.current === null) notices.tell(trouble.sentence);
    else setTrouble(trouble);
  };
  const troubleOf = async (signal: AbortSignal): Promise<DraftTrouble | null> => {
    try {
      const done = await finishShape(draft, (regions) => engine.client.checkRegions(regions));
      if (signal.aborted) return null;
      if ('sentence' in done) return done;
      const why = await onApply(done.shapes, signal);
      return why === null ? null : { sentence: why, field: null };
    } catch (error) {
      return { sentence: error instanceof Error ? error.message : String(error), field: null };
    }
  };
  return (
    <form
      ref={form}
      class="shape-editor"
      aria-label={`${TITLES[draft.kind]} of the region`}
      onSubmit={(e) => {
        e.preventDefault();
        void apply();
      }}
      onKeyDown={(e) => {
        if (e.key !== 'Escape') return;
        e.stopPropagation();
        e.preventDefault();
        cancel();
      }}
    >
      <div class="shape-head">
        <h3>{TITLES[draft.kind]}</h3>
        <Segments
          label="What the shape is"
          value={list}
          disabled={!holePossible}
          choices={[
            { value: 'parts', label: 'observed' },
            { value: 'holes', label: 'hole', title: 'Sky that is left out of the observed part' },
          ]}
          onChoose={(to) => put(draft, to)}
        />
      </div>
      <div class="shape-fields">
        {DRAFT_FIELDS[draft.kind].map(({ name, label }) => (
          <DraftField
            key={name}
            label={label}
            unit="deg"
            value={draft.fields[name]}
            trouble={trouble?.field === name ? trouble.sentence : null}
            onInput={(text) => put({ ...draft, fields: { ...draft.fields, [name]: text } })}
          />
        ))}
      </div>
      {draft.kind === 'polygon' ? (
        <PolygonFields
          draft={draft}
          trouble={trouble?.field === 'vertices' ? trouble.sentence : null}
          onChange={put}
        />
      ) : null}
      {trouble !== null && trouble.field === null ? (
        <p class="field-trouble" role="alert">
          {trouble.sentence}
        </p>
      ) : null}
      <div class="actions">
        <button type="submit" class="button accent-button">
          {isNew ? 'Add' : 'Change'}
        </button>
        <button type="button" class="button" onClick={cancel}>
          Cancel
        </button>
      </div>
    </form>
  );
}

function PolygonFields(props: {
  readonly draft: ShapeDraft;
  readonly trouble: string | null;
  readonly onChange: (draft: ShapeDraft) => void;
}) {
  const { draft, trouble, onChange } = props;
  const { bridge, notices } = useApp();
  const id = useId();
  const fromFile = async (): Promise<void> => {
    try {
      const [file] = await bridge.chooseFiles('region');
      if (file === undefined) return;
      if (file.sizeBytes > LONGEST_FILE_BYTES) {
        notices.tell(
          `"${file.name}" has ${file.sizeBytes} bytes, a polygon file of at most ${LONGEST_FILE_BYTES} was expected: choose a text file with RA and Dec of the vertices.`,
        );
        return;
      }
      const vertices = await (await fetch(file.url)).text();
      bridge.releaseFile(file);
      onChange({ ...draft, vertices });
    } catch (error) {
      notices.tell(error instanceof Error ? error.message : String(error));
    }
  };
  return (
    <>
      <div class="field polygon-text">
        <label for={id}>vertices: RA and Dec in deg, one a line</label>
        <textarea
          id={id}
          rows={6}
          spellcheck={false}
          value={draft.vertices}
          aria-invalid={trouble !== null}
          aria-describedby={`${id}-note`}
          onInput={(e) => onChange({ ...draft, vertices: e.currentTarget.value })}
        />
        {trouble === null ? (
          <p class="field-hint" id={`${id}-note`}>
            Edges are great circles. A blank line begins another polygon.
          </p>
        ) : (
          <p class="field-trouble" id={`${id}-note`} role="alert">
            {trouble}
          </p>
        )}
      </div>
      <div class="shape-head">
        <button type="button" class="button" onClick={() => void fromFile()}>
          From a file…
        </button>
        <Segments
          label="Which side of the polygon"
          value={draft.side}
          choices={[
            { value: 'smaller', label: 'smaller side' },
            { value: 'larger', label: 'larger' },
          ]}
          onChoose={(side) => onChange({ ...draft, side })}
        />
      </div>
    </>
  );
}
