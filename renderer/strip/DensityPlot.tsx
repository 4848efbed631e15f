import { line } from 'd3-shape';
import { useId } from 'preact/hooks';
import { commonPower, densityMarks } from './densityScale.ts';
import { densityText } from './densityText.ts';
import type { StripRows } from './rows.ts';
import type { ShownProfile, StripModel } from './stripModel.ts';

const MARK_EVERY_PX = 30;

/** The histogram, the smooth curve through it, and the two scales: n at the left, n P0 at the right. */
export function DensityPlot({ model, rows }: { readonly model: StripModel; readonly rows: StripRows }) {
  const id = useId();
  const scale = model.scale.value;
  const density = model.density.value;
  const profile = model.profile.value;
  const perDensity = model.powerPerDensity.value;
  if (scale === null) return null;
  const { leftPx, rightPx } = scale;
  const { plotTop, plotBottom } = rows;
  const height = plotBottom - plotTop;
  const yAt = (value: number): number | null => {
    const share = density.share(value);
    return share === null ? null : plotBottom - share * height;
  };
  const noiseY = perDensity === null ? null : yAt(1 / perDensity);
  const noise = profile === null || noiseY === null ? null : noiseMark(noiseY, rows);
  const paths =
    profile === null ? null : profilePaths(profile, scale.atReading, model.primary.value.factor, yAt, rows);
  const most = Math.max(2, Math.floor(height / MARK_EVERY_PX));
  const left = profile === null ? [] : densityMarks(density, 1, most);
  const right = profile === null || perDensity === null ? [] : densityMarks(density, perDensity, most);
  const power = density.upward === 'log' ? 0 : commonPower(density.high);
  return (
    <g class="strip-density">
      <clipPath id={`${id}-plot`}>
        <rect x={leftPx} y={plotTop} width={rightPx - leftPx} height={height} />
      </clipPath>
      <clipPath id={`${id}-above`}>
        <rect
          x={leftPx}
          y={plotTop}
          width={rightPx - leftPx}
          height={noiseY === null ? 0 : Math.max(0, Math.min(height, noiseY - plotTop))}
        />
      </clipPath>
      {left.map((value) => (
        <ScaleMark
          key={value}
          y={yAt(value)}
          x={leftPx}
          side="left"
          text={densityText(value, density.upward, power)}
          rows={rows}
        />
      ))}
      {right
        .filter((value) => value !== 1)
        .map((value) => (
          <ScaleMark
            key={value}
            y={yAt(perDensity === null ? 0 : value / perDensity)}
            x={rightPx}
            side="right"
            text={densityText(value, density.upward, 0)}
            rows={rows}
            keepFrom={noise?.labelY ?? null}
          />
        ))}
      {paths === null ? null : (
        <g clip-path={`url(#${id}-plot)`}>
          <path class="strip-bars" d={paths.bars} />
          <path class="strip-steps" d={paths.steps} />
          <path class="strip-overflow" d={paths.overflow} />
          {profile?.hasCurve ? (
            <>
              <path class="strip-smooth" d={paths.smooth} />
              <path
                class="strip-smooth strip-smooth-above"
                d={paths.smooth}
                clip-path={`url(#${id}-above)`}
              />
            </>
          ) : null}
        </g>
      )}
      {noise === null ? null : (
        <g class="strip-noise">
          {noise.inView ? (
            <>
              <line class="strip-noise-line" x1={leftPx} x2={rightPx} y1={noise.labelY} y2={noise.labelY} />
              <line
                class="strip-noise-end"
                x1={rightPx}
                x2={rightPx + 5}
                y1={noise.labelY}
                y2={noise.labelY}
              />
            </>
          ) : null}
          <text x={rightPx + 8} y={noise.labelY} dy="0.35em">
            {noise.text}
          </text>
        </g>
      )}
    </g>
  );
}

// Where n P0 = 1 stands, or in which direction it lies out of the scale.
function noiseMark(y: number, { plotTop, plotBottom }: StripRows) {
  if (y < plotTop) return { inView: false, labelY: plotTop + 4, text: '1 ↑' };
  if (y > plotBottom) return { inView: false, labelY: plotBottom - 4, text: '1 ↓' };
  return { inView: true, labelY: y, text: '1' };
}

function ScaleMark(props: {
  readonly y: number | null;
  readonly x: number;
  readonly side: 'left' | 'right';
  readonly text: string;
  readonly rows: StripRows;
  /** Height of another mark, which this one must not crowd. */
  readonly keepFrom?: number | null;
}) {
  const { y, x, side, text, rows, keepFrom = null } = props;
  if (y === null || y < rows.plotTop - 0.5 || y > rows.plotBottom + 0.5) return null;
  const out = side === 'left' ? -1 : 1;
  const crowded = keepFrom !== null && Math.abs(keepFrom - y) < 14;
  return (
    <g class={`strip-mark strip-mark-${side}`}>
      <line x1={x} x2={x + 4 * out} y1={y} y2={y} />
      {crowded ? null : (
        <text x={x + 8 * out} y={y} dy="0.35em">
          {text}
        </text>
      )}
    </g>
  );
}

// All bars are one path, and their tops another, so that two hundred of them cost two elements.
function profilePaths(
  { bins, density, smooth }: ShownProfile,
  atReading: (reading: number) => number,
  factor: number,
  yAt: (value: number) => number | null,
  { plotTop, plotBottom }: StripRows,
) {
  let bars = '';
  let steps = '';
  let overflow = '';
  let before = plotBottom;
  const points: [x: number, y: number | null][] = [];
  for (let i = 0; i < density.length; i++) {
    const x0 = atReading(bins.shownEdges[i]! / factor);
    const x1 = atReading(bins.shownEdges[i + 1]! / factor);
    points.push([(x0 + x1) / 2, yAt(smooth[i]!)]);
    if (i < bins.first || i >= bins.end) continue;
    const y = density[i]! > 0 ? yAt(density[i]!) : null;
    const top = y === null ? plotBottom : Math.max(plotTop, Math.min(plotBottom, y));
    // Empty bins break the line of the tops: a line along the floor would read as galaxies.
    if (top < plotBottom || before < plotBottom)
      steps += `${before < plotBottom || i === bins.first ? '' : `M${x0.toFixed(2)} ${plotBottom}`}${i === bins.first ? 'M' : 'L'}${x0.toFixed(2)} ${top.toFixed(2)}${top < plotBottom ? `H${x1.toFixed(2)}` : ''}`;
    before = top;
    if (y === null || top >= plotBottom) continue;
    bars += `M${x0.toFixed(2)} ${plotBottom}V${top.toFixed(2)}H${x1.toFixed(2)}V${plotBottom}Z`;
    if (y < plotTop - 0.5) {
      const x = (x0 + x1) / 2;
      overflow += `M${(x - 4).toFixed(2)} ${plotTop + 6}L${x.toFixed(2)} ${plotTop + 1}L${(x + 4).toFixed(2)} ${plotTop + 6}Z`;
    }
  }
  if (before < plotBottom) steps += `V${plotBottom}`;
  const curve = line<[number, number | null]>()
    .defined(([, y]) => y !== null && Number.isFinite(y))
    .x(([x]) => x)
    .y(([, y]) => Math.max(plotTop - 1000, Math.min(plotBottom + 1000, y!)));
  return { bars, steps, overflow, smooth: curve(points) ?? '' };
}
