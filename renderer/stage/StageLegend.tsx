import type { ReadonlySignal } from '@preact/signals';
import { legend } from '../colour/legend.ts';
import { useApp } from '../state/app.ts';
import type { Colours } from './coneInputs.ts';

/** What the colours of the galaxies mean. */
export function StageLegend({ colours }: { readonly colours: ReadonlySignal<Colours | null> }) {
  const { view } = useApp();
  const shown = colours.value?.legend;
  if (shown == null) return null;
  return (
    <span class="stage-legend" title={shown.title}>
      <span>{shown.low}</span>
      <i style={{ background: legend(shown.map, view.theme.value, shown.reversed).cssGradient }} />
      <span>{shown.high}</span>
    </span>
  );
}
