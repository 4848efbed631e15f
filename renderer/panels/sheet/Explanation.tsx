import { unitText } from '../../ui/unitText.ts';
import { type ExplainedShell, explain, shellQuantity } from './explain.ts';

/** What a number is, how it is computed, from what, how sure it is, and which paper says so. */
export function Explanation({
  quantityKey,
  of,
}: {
  readonly quantityKey: string;
  readonly of: ExplainedShell;
}) {
  const quantity = shellQuantity(quantityKey);
  if (quantity === undefined) return null;
  const { inputs, uncertainty } = explain(quantityKey, of);
  return (
    <div class="explanation" data-explained={quantityKey}>
      <p>{quantity.meaning}</p>
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
