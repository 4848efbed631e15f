import { ConeView } from '../../../renderer/cone/coneView.ts';
import type {
  ConeTheme,
  FieldInput,
  FrameStatistics,
  GalaxyInput,
  RadialReading,
  RadialScaleInput,
  Tick,
  ViewName,
} from '../../../renderer/cone/types.ts';
import { measureCone, measurePlainPoints } from './measure.ts';
import { clustered, type Patch, read, universe } from './sample.ts';

const query = new URLSearchParams(location.search);
const text = (name: string, fallback: string) => query.get(name) ?? fallback;
const number = (name: string, fallback: number) => Number(query.get(name) ?? fallback);

const THEMES: Record<string, ConeTheme> = {
  dark: {
    mode: 'dark',
    background: '#0c1016',
    ink: '#e8ebf0',
    inkMuted: '#a4adbb',
    line: '#46505f',
    accent: '#f2b45c',
    fontFamily: '"Inter", "DejaVu Sans", system-ui, sans-serif',
  },
  light: {
    mode: 'light',
    background: '#fbfbf9',
    ink: '#1b2330',
    inkMuted: '#566072',
    line: '#b4bbc6',
    accent: '#a8590a',
    fontFamily: '"Inter", "DejaVu Sans", system-ui, sans-serif',
  },
};

function boxField(patch: Patch, name: string): FieldInput {
  const ra: number[] = [];
  const dec: number[] = [];
  const [w, h] = [patch.widthDeg / 2, patch.heightDeg / 2];
  const side = (a: [number, number], b: [number, number]) => {
    const steps = Math.max(2, Math.ceil(Math.hypot(b[0] - a[0], b[1] - a[1]) / 0.5));
    for (let i = 0; i < steps; i++) {
      ra.push(patch.raDeg + a[0] + ((b[0] - a[0]) * i) / steps);
      dec.push(patch.decDeg + a[1] + ((b[1] - a[1]) * i) / steps);
    }
  };
  side([-w, -h], [w, -h]);
  side([w, -h], [w, h]);
  side([w, h], [-w, h]);
  side([-w, h], [-w, -h]);
  return {
    centreRaDeg: patch.raDeg,
    centreDecDeg: patch.decDeg,
    radiusDeg: Math.hypot(w, h),
    positionAngleDeg: w * Math.cos((patch.decDeg * Math.PI) / 180) >= h ? 90 : 0,
    rings: [{ raDeg: Float64Array.from(ra), decDeg: Float64Array.from(dec) }],
    name,
  };
}

const scene = text('scene', 'demo');
const count = number('n', 60000);
const far = 5200;
const base = { raDeg: 160, decDeg: 4, widthDeg: 20, heightDeg: 10, nearMpc: 1900, farMpc: far };
const SCENES: Record<string, { patches: Patch[]; wide?: boolean; fields?: boolean; belt?: boolean }> = {
  demo: { patches: [{ ...base, count }] },
  needle: { patches: [{ ...base, widthDeg: 2, heightDeg: 1.4, count }] },
  several: {
    patches: [
      { ...base, count: Math.round(count * 0.8) },
      { ...base, raDeg: 34, decDeg: -5, widthDeg: 1.6, heightDeg: 1.2, count: Math.round(count * 0.1) },
      { ...base, raDeg: 270, decDeg: 62, widthDeg: 3, heightDeg: 1.5, count: Math.round(count * 0.1) },
    ],
  },
  sky: {
    patches: [{ ...base, raDeg: 180, decDeg: 0, widthDeg: 360, heightDeg: 180, nearMpc: 20, count }],
    wide: true,
    fields: false,
  },
  wide: {
    patches: [{ ...base, raDeg: 180, decDeg: 30, widthDeg: 130, heightDeg: 55, nearMpc: 60, count }],
    wide: true,
  },
  belt: {
    patches: [{ ...base, raDeg: 180, decDeg: 0, widthDeg: 360, heightDeg: 180, nearMpc: 20, count }],
    wide: true,
    belt: true,
  },
  sixty: { patches: [{ ...base, raDeg: 180, decDeg: 30, widthDeg: 60, heightDeg: 40, nearMpc: 60, count }] },
};
const chosen = SCENES[scene]!;
const reading = text('reading', 'comoving') as RadialReading;
const zTop = 2.2;
const u = universe(zTop);

function tick(mpc: number, label: string, level: number): Tick {
  return { comovingMpc: mpc, text: label, level };
}

function makeScale(of: RadialReading): RadialScaleInput {
  const end = u.comovingMpc.findIndex((v) => v > far * 1.02);
  const comovingMpc = u.comovingMpc.slice(0, end);
  const radius =
    of === 'comoving' ? comovingMpc : of === 'redshift' ? u.z.slice(0, end) : u.lookbackGyr.slice(0, end);
  const rulers = { redshift: [] as Tick[], lookback: [] as Tick[], comoving: [] as Tick[] };
  for (let i = 1; i <= 22; i++) {
    const z = i / 10;
    const r = read(u.z, u.comovingMpc, z);
    if (r < comovingMpc.at(-1)!) rulers.redshift.push(tick(r, z.toFixed(1), i % 5 === 0 ? 0 : 1));
  }
  for (let i = 1; i <= 12; i++) {
    const r = read(u.lookbackGyr, u.comovingMpc, i);
    if (r < comovingMpc.at(-1)!) rulers.lookback.push(tick(r, `${i}`, i % 2 === 0 ? 0 : 1));
  }
  for (let i = 0; i <= 26; i++) {
    if (i * 200 < comovingMpc.at(-1)!)
      rulers.comoving.push(
        tick(i * 200, i % 5 === 0 ? `${(i * 200).toLocaleString('en')}` : '', i % 5 === 0 ? 0 : 2),
      );
  }
  return {
    reading: of,
    table: { comovingMpc, radius },
    rulers,
    titles: { redshift: 'redshift', lookback: 'lookback time, Gyr', comoving: 'comoving distance, Mpc' },
    formatLength: (mpc) => `${mpc.toLocaleString('en')} Mpc`,
    lengthUnitMpc: 1,
  };
}

const log: FrameStatistics[] = [];
const waiting: (() => void)[] = [];
const nextFrame = () => new Promise<void>((resolve) => waiting.push(resolve));
const stage = document.querySelector<HTMLElement>('#stage')!;
const cone = new ConeView(stage, {
  onFrame: (statistics) => {
    log.push(statistics);
    for (const tell of waiting.splice(0)) tell();
    document.documentElement.dataset.rest = statistics.atRest && statistics.total > 0 ? 'yes' : 'no';
  },
  onViewChanged: (state) => console.log(JSON.stringify(state)),
  onDrawingState: (state) => console.log(JSON.stringify(state)),
  onAxisWindow: (window) => console.log(JSON.stringify(window)),
  onHover: (hit) => console.log(JSON.stringify({ hover: hit })),
  onPickShell: (index) => cone.setShells({ ...shells, selected: index }),
});
if (query.has('layer')) cone.setPointLayer(text('layer', 'auto') as 'auto');
cone.setTheme(THEMES[text('theme', 'dark')]!);
cone.setAxisWindow({ min: 0, max: 1 }, { leftPx: 56, rightPx: 28 });
const scale = makeScale(reading);
cone.setRadialScale(scale, { min: 0, max: scale.table.radius.at(-1)! });

/** As the program's engine hands them over. */
function inSharedMemory({ count: n, directions, comovingMpc }: GalaxyInput): GalaxyInput {
  const share = (values: Float64Array | Float32Array) => {
    const copy = new Float64Array(new SharedArrayBuffer(8 * values.length));
    copy.set(values);
    return copy;
  };
  if (!crossOriginIsolated || !('raDeg' in directions)) return { count: n, directions, comovingMpc };
  const { raDeg, decDeg } = directions;
  return {
    count: n,
    directions: { raDeg: share(raDeg), decDeg: share(decDeg) },
    comovingMpc: share(comovingMpc),
  };
}

/** A parallel of declination, interior to its north or south. */
function parallel(decDeg: number, northward: boolean) {
  const raDeg = Float64Array.from({ length: 720 }, (_, i) => (northward ? i / 2 : 360 - i / 2));
  return { raDeg, decDeg: raDeg.map(() => decDeg) };
}

const wholeSky = { centreRaDeg: 0, centreDecDeg: 0, radiusDeg: 180, positionAngleDeg: 90 };
cone.setFootprint({
  fields: chosen.belt
    ? [{ ...wholeSky, rings: [parallel(-20, true), parallel(20, false)] }]
    : chosen.fields === false
      ? []
      : chosen.patches.map((patch, i) =>
          boxField(patch, chosen.patches.length > 1 ? ['Wide', 'Deep A', 'Deep B'][i]! : ''),
        ),
  wide: chosen.wide ?? false,
});
const edges = text('edges', '0.55,0.8,1.05,1.35,1.7').split(',').filter(Boolean).map(Number);
const shells = {
  shells: edges.slice(1).map((z, i) => ({
    comovingMinMpc: read(u.z, u.comovingMpc, edges[i]!),
    comovingMaxMpc: read(u.z, u.comovingMpc, z),
    label: `${edges[i]} – ${z}`,
    longLabel: `${edges[i]} ≤ z < ${z}`,
  })),
  selected: query.has('selected') ? number('selected', 0) : null,
  hovered: null as number | null,
};
cone.setShells(shells);
cone.setColouring(
  text('colour', 'radius') === 'shell' ? { kind: 'shell' } : { kind: 'radius', map: text('map', 'harbour') },
);
if (query.has('view')) cone.setView(text('view', 'sideOn') as ViewName);
const galaxies = inSharedMemory(clustered(chosen.patches));
cone.setGalaxies(galaxies);

Object.assign(window, {
  cone,
  log,
  makeScale,
  THEMES,
  shells,
  galaxies,
  measure: (frames: number) => measureCone(cone, log, nextFrame, frames),
  measurePlain: (points: number, frames: number) =>
    measurePlainPoints(points, innerWidth, innerHeight, frames),
});
