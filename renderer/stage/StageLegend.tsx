import type { ReadonlySignal } from '@preact/signals';
import { legend } from '../colour/legend.ts';
import { useApp } from '../state/app.ts';
import type { ColourLegend } from './coneInputs.ts';

/** What the colours of the galaxies mean. */
export function StageLegend({
  colours,
}: {
  readonly colours: ReadonlySignal<{ legend: ColourLegend | null } | null>;
}) {
  const { view } = useApp();
  const shown = colours.value?.legend;
  if (shown == null) return null;
  const reversed = (colours.value as { input?: { reversed?: boolean } }).input?.reversed === true;
  return (
    <div class="stage-legend">
      <span>{shown.title}</span>
      <span class="stage-legend-bar">
        <span>{shown.low}</span>
        <i style={{ background: legend(shown.map, view.theme.value, reversed).cssGradient }} />
        <span>{shown.high}</span>
      </span>
    </div>
  );
}
