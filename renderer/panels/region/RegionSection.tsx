import { useState } from 'preact/hooks';
import type { Region, SkyShape } from '../../../shared-core/sky/region.ts';
import { describeRegion } from '../../../shared-core/sky/regionText.ts';
import { SkyMap } from '../../skymap/SkyMap.tsx';
import { useApp } from '../../state/app.ts';
import { focusSoon } from '../../ui/focusSoon.ts';
import { IconButton } from '../../ui/IconButton.tsx';
import { Menu } from '../../ui/Menu.tsx';
import { Section } from '../../ui/Section.tsx';
import { useStudyPart } from '../useStudyPart.ts';
import { AreaLine, useAreaGist } from './AreaLine.tsx';
import { putRegion } from './putRegion.ts';
import { type ShapePlace, withoutShape, withShapes } from './regionParts.ts';
import { ShapeEditor } from './ShapeEditor.tsx';
import { draftOfShape, newDraft, type ShapeDraft, type ShapeKind } from './shapeDraft.ts';

interface Editing {
  readonly draft: ShapeDraft;
  readonly list: 'parts' | 'holes';
  readonly inPlaceOf: ShapePlace | null;
  /** The region that the place is in: an undo in between makes the place stale. */
  readonly of: Region | null;
}

const ADD_ID = 'add-shape';

/** The observed sky: its map, its area, and its shapes by numbers or text. */
export function RegionSection() {
  const app = useApp();
  const region = useStudyPart('region');
  const [kept, setEditing] = useState<Editing | null>(null);
  const editing = kept !== null && (kept.inPlaceOf === null || kept.of === region) ? kept : null;

  const put = (next: Region | null, label: string, signal?: AbortSignal): Promise<string | null> =>
    putRegion(app, { from: region, next, label }, signal);
  const putOrTell = async (next: Region | null, label: string): Promise<void> => {
    const why = await put(next, label);
    if (why !== null) app.notices.tell(why);
  };
  const start = (kind: ShapeKind): void => {
    if (kind === 'wholeSky' && region === null)
      void putOrTell({ parts: [{ kind }], holes: [] }, 'Observe the whole sky');
    else setEditing({ draft: newDraft(kind), list: 'parts', inPlaceOf: null, of: region });
  };
  const cancel = (): void => {
    setEditing(null);
    focusSoon(ADD_ID);
  };
  const apply = async (shapes: readonly SkyShape[], signal: AbortSignal): Promise<string | null> => {
    if (editing === null) return null;
    const { list, inPlaceOf } = editing;
    const what = list === 'parts' ? 'observed shape' : 'hole';
    const why = await put(
      withShapes(region, list, shapes, inPlaceOf),
      inPlaceOf === null
        ? `Add an ${what}`.replace('an hole', 'a hole')
        : `Change an ${what}`.replace('an hole', 'a hole'),
      signal,
    );
    if (why === null && !signal.aborted) {
      setEditing(null);
      focusSoon(ADD_ID, null);
    }
    return why;
  };
  const partsLeft = (region?.parts.length ?? 0) - (editing?.inPlaceOf?.list === 'parts' ? 1 : 0);
  return (
    <Section id="region" title="Region" gist={useAreaGist()} openAtFirst>
      <SkyMap />
      <AreaLine />
      {region === null ? null : (
        <>
          <ShapeList
            region={region}
            list="parts"
            put={putOrTell}
            onEdit={(place, shape) =>
              setEditing({ draft: draftOfShape(shape), list: 'parts', inPlaceOf: place, of: region })
            }
          />
          <ShapeList
            region={region}
            list="holes"
            put={putOrTell}
            onEdit={(place, shape) =>
              setEditing({ draft: draftOfShape(shape), list: 'holes', inPlaceOf: place, of: region })
            }
          />
        </>
      )}
      {editing === null ? (
        <div class="actions">
          <Menu
            label="Add a shape"
            buttonId={ADD_ID}
            entries={[
              { kind: 'item', label: 'Box…', hint: 'RA and Dec from, to', run: () => start('box') },
              { kind: 'item', label: 'Cap…', hint: 'centre and radius', run: () => start('cap') },
              {
                kind: 'item',
                label: 'Polygon…',
                hint: 'vertices, pasted or from a file',
                run: () => start('polygon'),
              },
              { kind: 'item', label: 'Whole sky', run: () => start('wholeSky') },
            ]}
          />
          {region === null ? null : (
            <button
              type="button"
              class="button"
              title="Give the region up: the area is estimated from the catalogue"
              onClick={() => {
                void putOrTell(null, 'Give the region up');
                focusSoon(ADD_ID);
              }}
            >
              Clear region
            </button>
          )}
        </div>
      ) : (
        <ShapeEditor
          draft={editing.draft}
          list={editing.list}
          holePossible={partsLeft > 0}
          isNew={editing.inPlaceOf === null}
          onChange={(draft, list) => setEditing({ ...editing, draft, list })}
          onApply={apply}
          onCancel={cancel}
        />
      )}
    </Section>
  );
}

function ShapeList(props: {
  readonly region: Region;
  readonly list: 'parts' | 'holes';
  readonly put: (next: Region | null, label: string) => Promise<void>;
  readonly onEdit: (place: ShapePlace, shape: SkyShape) => void;
}) {
  const { region, list, put, onEdit } = props;
  const shapes = region[list];
  if (shapes.length === 0) return null;
  const remove = async (place: ShapePlace): Promise<void> => {
    const next = withoutShape(region, place);
    const had = document.activeElement;
    await put(
      next,
      next === null ? 'Give the region up' : list === 'parts' ? 'Remove an observed shape' : 'Remove a hole',
    );
    focusSoon(ADD_ID, had);
  };
  return (
    <ul class="shapes" aria-label={list === 'parts' ? 'Observed shapes' : 'Holes'}>
      {shapes.map((shape, index) => {
        const words = describeRegion({ parts: [shape], holes: [] });
        return (
          <li key={index}>
            <span class="shape-words">
              {list === 'holes' ? <span class="hole-mark">less </span> : null}
              {words}
            </span>
            {shape.kind === 'wholeSky' ? null : (
              <IconButton
                icon="edit"
                label={`Change: ${words}`}
                onClick={() => onEdit({ list, index }, shape)}
              />
            )}
            <IconButton
              icon="close"
              label={`Remove: ${words}`}
              onClick={() => void remove({ list, index })}
            />
          </li>
        );
      })}
    </ul>
  );
}
