import { useState } from 'preact/hooks';
import { PUBLISHED_SETS } from '../../../shared-core/cosmology/publishedSets.ts';
import { shownUnit } from '../../../shared-core/report/quantity.ts';
import { useApp } from '../../state/app.ts';
import { IconButton } from '../../ui/IconButton.tsx';
import { Switch } from '../../ui/Switch.tsx';
import { unitText } from '../../ui/unitText.ts';
import { fieldInView } from '../fieldsInView.ts';
import { ShellMark } from '../ShellMark.tsx';
import { Explanation } from './Explanation.tsx';
import { type ExplainedShell, shellQuantity } from './explain.ts';
import { SheetNumber } from './SheetNumber.tsx';
import { ShellDrawing } from './ShellDrawing.tsx';
import { EDGE_ROWS, edgeTold, SHEET_GROUPS } from './sheetLayout.ts';
import { shellWarnings } from './warnings.ts';

/** Everything about the chosen shell; about all of them as one while none is chosen. */
export function ShellSheet() {
  const app = useApp();
  const { derived, view, engine, studyState } = app;
  const [allDigits, setAllDigits] = useState(false);
  const shells = derived.shells.value;
  const chosen = view.selectedShell.value;
  const index = chosen !== null && chosen < shells.length ? chosen : null;
  const shell = index === null ? derived.total.value : shells[index]!;
  const conditions = derived.conditions.value;
  if (shell === null || conditions === null) return null;

  const { study } = studyState;
  const set = PUBLISHED_SETS.find((one) => one.key === study.value.cosmologySet);
  const units = derived.units.value;
  const estimate = engine.selected.value?.footprint?.estimate ?? null;
  const planned = engine.selected.value === null;
  const total = derived.total.value;
  const column = total === null ? shells : [...shells, total];
  const of: ExplainedShell = {
    shell,
    column,
    conditions,
    estimate,
    units,
    cosmologyName: set?.name ?? 'own parameters',
    planned,
  };
  const warnings = shellWarnings(shell, conditions, estimate, planned);
  const explained = view.explained.value;
  const field = fieldInView(app);
  const step = (by: number) =>
    void (view.selectedShell.value = Math.max(
      0,
      Math.min(shells.length - 1, (index ?? (by > 0 ? -1 : shells.length)) + by),
    ));
  const number = (key: string) => (
    <SheetNumber quantityKey={key} shell={shell} column={column} units={units} allDigits={allDigits} />
  );
  const unit = (key: string) => <span class="unit">{unitText(shownUnit(shellQuantity(key)!, units))}</span>;

  return (
    <section class={allDigits ? 'sheet sheet-digits' : 'sheet'} aria-labelledby="sheet-title">
      <header class="sheet-head">
        <h2 id="sheet-title" tabIndex={-1}>
          {index === null ? (
            'All shells as one'
          ) : (
            <>
              Shell <ShellMark index={index} />
            </>
          )}
        </h2>
        <Switch label="all digits" checked={allDigits} onChange={setAllDigits} />
        <IconButton
          icon="before"
          label="Previous shell"
          detail="["
          disabled={index === 0}
          onClick={() => step(-1)}
        />
        <IconButton
          icon="after"
          label="Next shell"
          detail="]"
          disabled={index === shells.length - 1}
          onClick={() => step(1)}
        />
      </header>
      {index === null ? (
        <p class="quiet">One shell from the first edge to the last; its V eff is not the sum of the rows.</p>
      ) : null}
      <ShellDrawing
        shell={shell}
        units={units}
        halfAngleRad={((field === undefined || field.wide ? 180 : field.halfLengthDeg) * Math.PI) / 180}
        curved={Math.abs(conditions.cosmology.omegaK0) > 1e-9}
      />
      {warnings.length === 0 ? null : (
        <ul class="warnings" aria-label="What to beware of">
          {warnings.map(({ key, sentence }) => (
            <li key={key}>{sentence}</li>
          ))}
        </ul>
      )}
      <div class="sheet-edges">
        <div class="sheet-row sheet-heads" aria-hidden="true">
          <span />
          <span>near edge</span>
          <span>far edge</span>
        </div>
        {EDGE_ROWS.map(({ name, near, far }) => (
          <div key={name} class="sheet-row">
            <span class="sheet-name">
              {name} {unit(near)}
            </span>
            {number(near)}
            {number(far)}
            {explained === near || explained === far ? (
              <Explanation quantityKey={explained} of={of} edge={edgeTold(explained, index, shells.length)} />
            ) : null}
          </div>
        ))}
      </div>
      {SHEET_GROUPS.map((group) => (
        <div key={group.title} class="sheet-group">
          <h3>{group.title}</h3>
          {group.rows.map(({ key, name }) => (
            <div key={key} class="sheet-row sheet-single">
              <span class="sheet-name">
                {name} {unit(key)}
              </span>
              {number(key)}
              {explained === key ? <Explanation quantityKey={key} of={of} /> : null}
            </div>
          ))}
        </div>
      ))}
    </section>
  );
}
