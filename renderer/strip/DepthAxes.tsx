import { useComputed } from '@preact/signals';
import type { RadialReading } from '../../shared-core/study/schema.ts';
import { axisMarks, DIGIT_WIDTH } from './axisMarks.ts';
import type { StripRows } from './rows.ts';
import type { StripModel } from './stripModel.ts';

/** The order of the axes: the linear one next to the plot, then the others in the order of the trade. */
export function axisOrder(primary: RadialReading): readonly [RadialReading, RadialReading, RadialReading] {
  const all: RadialReading[] = ['redshift', 'lookback', 'comoving'];
  const [second, third] = all.filter((kind) => kind !== primary) as [RadialReading, RadialReading];
  return [primary, second, third];
}

/** Redshift, lookback time and comoving distance along one line of sight, each marked at its own round values. */
export function DepthAxes({ model, rows }: { readonly model: StripModel; readonly rows: StripRows }) {
  const marks = useComputed(() => {
    const [scale, size] = [model.scale.value, model.size.value];
    if (scale === null || size === null) return null;
    const readings = model.readings.value;
    return axisOrder(model.primary.value.kind).map((kind) => ({
      kind,
      marks: axisMarks(readings[kind], scale, model.window.value, size.fontPx),
    }));
  });
  const scale = model.scale.value;
  if (marks.value === null || scale === null) return null;
  const fontPx = model.size.value?.fontPx ?? 12;
  return (
    <g class="strip-axes">
      {marks.value.map(({ kind, marks: own }, row) => {
        const top = rows.axisTops[row]!;
        return (
          <g
            key={kind}
            class={row === 0 ? 'strip-axis strip-axis-primary' : 'strip-axis'}
            transform={`translate(0 ${top})`}
          >
            <line class="strip-axis-line" x1={scale.leftPx} x2={scale.rightPx} y1="0.5" y2="0.5" />
            <path
              class="strip-axis-ticks"
              d={own.map((m) => `M${m.px.toFixed(2)} 0.5v${m.text === null ? 2.5 : 5}`).join('')}
            />
            {own.map((m) =>
              m.text === null ? null : (
                <text key={m.value} x={heldIn(m.px, m.text, scale.rightPx, fontPx)} y={fontPx + 5}>
                  {m.text}
                </text>
              ),
            )}
          </g>
        );
      })}
    </g>
  );
}

/** Room for a number behind the end of the plot, before the tools that stand there. */
const ROOM_BEHIND_PX = 9;

/** Where the middle of a number stands: at its mark, or so far before it that the number ends before the tools. */
export function heldIn(px: number, text: string, rightPx: number, fontPx: number): number {
  return Math.min(px, rightPx + ROOM_BEHIND_PX - (text.length * DIGIT_WIDTH * fontPx) / 2);
}
