import { cssColour, shellColours } from '../colour/shellColours.ts';
import { useApp } from '../state/app.ts';
import type { StripRows } from './rows.ts';
import type { StripModel } from './stripModel.ts';

const FILL = { light: 0.16, dark: 0.18 } as const;
const FILL_STRONG = { light: 0.34, dark: 0.36 } as const;

/** The shells as bands over the depth, in the colours that they have in the cone, numbered from the observer. */
export function ShellBands({ model, rows }: { readonly model: StripModel; readonly rows: StripRows }) {
  const { studyState, view } = useApp();
  const scale = model.scale.value;
  const size = model.size.value;
  const { edges } = studyState.study.value;
  if (scale === null || size === null || edges.length < 2) return null;
  const ground = view.theme.value;
  const colours = shellColours(edges.length - 1, ground);
  const { plotTop, railBottom } = rows;
  const bands = [];
  for (let i = 0; i + 1 < edges.length; i++) {
    const from = Math.max(scale.leftPx, scale.at(edges[i]!));
    const to = Math.min(scale.rightPx, scale.at(edges[i + 1]!));
    if (!(to > from)) continue;
    const number = String(i + 1);
    const strong = view.selectedShell.value === i || view.hoveredShell.value === i;
    bands.push(
      <g key={i} class={view.selectedShell.value === i ? 'strip-band strip-band-selected' : 'strip-band'}>
        <rect
          x={from}
          y={plotTop}
          width={to - from}
          height={railBottom - plotTop}
          fill={cssColour(colours[i]!, (strong ? FILL_STRONG : FILL)[ground])}
        />
        <rect x={from} y={plotTop - 3} width={to - from} height="3" fill={cssColour(colours[i]!)} />
        {to - from > (number.length * 0.62 + 0.5) * size.fontPx ? (
          <text x={(from + to) / 2} y={plotTop - 6}>
            {number}
          </text>
        ) : null}
      </g>,
    );
  }
  return <g class="strip-bands">{bands}</g>;
}
