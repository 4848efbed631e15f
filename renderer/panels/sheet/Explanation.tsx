import { useMemo, useState } from 'preact/hooks';
import { useApp } from '../../state/app.ts';
import { EdgeForm } from '../../strip/EdgeForm.tsx';
import { readingsOf } from '../../strip/readings.ts';
import { unitText } from '../../ui/unitText.ts';
import { type ExplainedShell, explain, shellQuantity } from './explain.ts';
import { type edgeTold, MOVE_EDGE_ID } from './sheetLayout.ts';

/** What a number is, how it is computed, from what, how sure it is, and which paper says so. */
export function Explanation({
  quantityKey,
  of,
  edge = null,
}: {
  readonly quantityKey: string;
  readonly of: ExplainedShell;
  /** The edge whose place the number is: it can be moved here. */
  readonly edge?: ReturnType<typeof edgeTold>;
}) {
  const quantity = shellQuantity(quantityKey);
  if (quantity === undefined) return null;
  const { inputs, uncertainty } = explain(quantityKey, of);
  return (
    <div class="explanation" data-explained={quantityKey}>
      <p>{quantity.meaning}</p>
      {edge === null ? null : <MoveEdge edge={edge} of={of} />}
      <p class="formula">{quantity.formula}</p>
      {inputs.length === 0 ? null : (
        <dl class="explanation-inputs">
          {inputs.map(({ name, text, unit }) => (
            <div key={name}>
              <dt>{name}</dt>
              <dd>
                {text} <span class="unit">{unitText(unit)}</span>
              </dd>
            </div>
          ))}
        </dl>
      )}
      <p>
        <b>How sure:</b> {uncertainty}
      </p>
      <p class="source-line">
        <b>Source:</b> {quantity.source}
      </p>
    </div>
  );
}

/** Puts the edge elsewhere, by a number. */
function MoveEdge({
  edge: { index, unit },
  of: { conditions, units },
}: {
  readonly edge: NonNullable<ReturnType<typeof edgeTold>>;
  readonly of: ExplainedShell;
}) {
  const { studyState } = useApp();
  const readings = useMemo(
    () => readingsOf(conditions.cosmology, units),
    [conditions.cosmology, units.perH, units.h],
  );
  // What was typed and is taken is the edge's own place: the field begins anew.
  const [taken, setTaken] = useState(0);
  const z = studyState.study.value.edges[index];
  if (z === undefined) return null;
  return (
    <EdgeForm
      key={`${index} ${unit} ${z} ${taken}`}
      label="Move this edge to"
      typing={{ kind: 'move', index, z }}
      readings={readings}
      unit={unit}
      inputId={MOVE_EDGE_ID}
      takesFocus={taken > 0}
      onDone={() => setTaken(taken + 1)}
    />
  );
}
