import type { ReadonlySignal } from '@preact/signals';
import { Refusal } from '../../shared-core/base/refusal.ts';
import { roundTo } from '../../shared-core/base/roundTo.ts';
import { changeLook } from '../../shared-core/study/edits.ts';
import type { ViewState as ConeState } from '../cone/types.ts';
import { useApp } from '../state/app.ts';

/** How much the side-on view widens a narrow field; empty takes the program's proposal. */
export function SidewaysField({ coneState }: { readonly coneState: ReadonlySignal<ConeState | null> }) {
  const { studyState, notices } = useApp();
  const { sideways } = studyState.study.value.look;
  const state = coneState.value;
  if (state === null || (state.view !== 'sideOn' && state.view !== 'parallel')) return null;
  const commit = (text: string): void => {
    const typed = text.trim();
    const value = typed === '' ? null : Number(typed);
    try {
      if (value !== null && !(value >= 1 && value <= 10_000))
        throw new Refusal(
          `The widening is "${typed}", expected a number from 1 to 10000, or nothing for the proposal.`,
        );
      studyState.perform(changeLook('Widen the field', { sideways: value }));
    } catch (error) {
      if (error instanceof Refusal) notices.tell(error.message);
    }
  };
  return (
    <label class="stage-sideways">
      <span>sideways ×</span>
      <input
        type="text"
        inputMode="decimal"
        size={4}
        value={sideways === null ? '' : String(sideways)}
        placeholder={String(roundTo(state.sidewaysFactor, 3))}
        onBlur={(e) => commit(e.currentTarget.value)}
        onKeyDown={(e) => {
          if (e.key === 'Enter') commit(e.currentTarget.value);
        }}
      />
    </label>
  );
}
