import { useId } from 'preact/hooks';
import { formatNumber, type ShownUnits, UNITS } from '../../../shared-core/report/quantity.ts';
import type { ShellStatistics } from '../../../shared-core/shells/shell.ts';
import { roundLength, shellOutline } from './shellOutline.ts';

const WIDTH = 320;
const HEIGHT = 96;
/** Left of the shell: the observer, at no scale. */
const OBSERVER = 26;
const BAR_ROOM = 18;

/** The shell from the side, true to scale: the observer is to the left, the width is that of the field looked at. */
export function ShellDrawing(props: {
  readonly shell: ShellStatistics;
  readonly halfAngleRad: number;
  readonly units: ShownUnits;
  readonly curved: boolean;
}) {
  const { shell, halfAngleRad, units, curved } = props;
  const id = useId();
  const { comovingMinMpc: near, comovingMaxMpc: far } = shell;
  const outline = shellOutline(near, far, halfAngleRad, {
    width: WIDTH - 2 * OBSERVER,
    height: HEIGHT - BAR_ROOM,
  });
  const perMpc = units.perH ? units.h : 1;
  const unit = UNITS.Mpc.plain[units.perH ? 1 : 0];
  const length = (mpc: number) => `${formatNumber(mpc * perMpc, { significant: 4 })} ${unit}`;
  // The bar is round in the reader's unit.
  const bar = roundLength((0.4 * WIDTH * perMpc) / outline.pxPerMpc);
  const barPx = (bar / perMpc) * outline.pxPerMpc;
  const wide = halfAngleRad >= Math.PI / 2;
  const extent = wide
    ? 'all around the observer'
    : `${length(2 * far * Math.sin(halfAngleRad))} across at its far edge`;
  const title = `The shell from the side, true to scale: ${length(far - near)} deep, ${extent}.`;
  return (
    <figure class="shell-drawing">
      <svg viewBox={`0 0 ${WIDTH} ${HEIGHT}`} role="img" aria-labelledby={id}>
        <title id={id}>{title}</title>
        <g transform={`translate(${OBSERVER} 0)`}>
          <path class="shell-shape" d={outline.path} fill-rule="evenodd" />
          {wide ? null : (
            <g class="sight-line">
              <circle cx={8 - OBSERVER} cy={outline.middleY} r={4} />
              <path d={`M${14 - OBSERVER} ${outline.middleY}H${outline.farX}`} />
            </g>
          )}
        </g>
        <g class="scale-bar" transform={`translate(${(WIDTH - barPx) / 2} ${HEIGHT - 6})`}>
          <path d={`M0.5 -3v3H${barPx}v-3`} />
          <text x={barPx + 6} y={2}>{`${bar} ${unit}`}</text>
        </g>
      </svg>
      <figcaption>
        {length(far - near)} deep, {extent}; to scale
        {curved ? ', drawn as if space were flat' : ''}
      </figcaption>
    </figure>
  );
}
