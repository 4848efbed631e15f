import { pickPoint } from '../../geometry/pickPoint.ts';
import { type PointArrays, type PointLayout, pointLayout, pointViews } from '../pointArrays.ts';
import { LIGHT_STEPS, toneTable, VALUE_STEPS } from '../tone.ts';
import {
  BARRIER_AT,
  type Finish,
  type FromWorker,
  RESERVED_BYTES,
  SCRATCH_AT,
  TABLE_AT,
  type ToWorker,
} from './messages.ts';
import { PAGE_BYTES } from './sharedMemory.ts';
import { softDiscs, splat, sumsLength } from './splat.ts';
import { toneRows } from './toneRows.ts';
import { type WideKernel, wideKernel } from './wideKernel.ts';

const LONGEST_WAIT_MS = 5000;

type Draw = Extract<ToWorker, { kind: 'draw' }>;

let memory: WebAssembly.Memory | null = null;
let isShared = false;
let layout: PointLayout | null = null;
let points: PointArrays | null = null;
let kernel: WideKernel | null = null;
let discs = { diameter: -1, ...softDiscs(1) };

const answer = (message: FromWorker, transfer: Transferable[] = []): void =>
  postMessage(message, { transfer });

async function take(
  next: WebAssembly.Memory,
  shared: boolean,
  at: PointLayout,
  scratchAt: number,
  wide: boolean,
) {
  memory = next;
  isShared = shared;
  layout = at;
  points = pointViews(next.buffer, at);
  kernel = wide ? await wideKernel(next, shared, at, scratchAt) : null;
}

/** Room behind the points in the worker's own memory: the sums, then the picture. */
function ownRoom(width: number, height: number): { sumsAt: number; imageAt: number } {
  const sumsAt = Math.ceil(layout!.end / PAGE_BYTES) * PAGE_BYTES;
  const imageAt = sumsAt + Math.ceil((4 * sumsLength(width, height)) / 64) * 64;
  const missing = imageAt + 4 * width * height - memory!.buffer.byteLength;
  if (missing > 0) {
    memory!.grow(Math.ceil(missing / PAGE_BYTES));
    // Growing an unshared memory takes its old buffer away.
    points = pointViews(memory!.buffer, layout!);
  }
  return { sumsAt, imageAt };
}

function splatRuns(message: Draw): void {
  const { width, height, diameter, emphasis } = message;
  const sumsAt = isShared ? message.sumsAt : ownRoom(width, height).sumsAt;
  const sums = new Float32Array(memory!.buffer, sumsAt, sumsLength(width, height));
  if (message.clear) sums.fill(0);
  if (discs.diameter !== diameter) discs = { diameter, ...softDiscs(diameter) };
  const [emphasisMin, emphasisMax, dim] = emphasis;
  for (const { from, to, matrix, light, depth, least } of message.runs) {
    const how = {
      matrix,
      width,
      height,
      light,
      emphasisMin,
      emphasisMax,
      dim,
      depth,
      least,
      side: discs.side,
      discs: discs.discs,
    };
    if (kernel) kernel.splat(from, to, how, sumsAt);
    else splat(points!, from, to, how, sums);
  }
}

/** Waits until all hands have splatted their share. */
function meet(hands: number): void {
  const barrier = new Int32Array(memory!.buffer, BARRIER_AT, 1);
  if (Atomics.add(barrier, 0, 1) + 1 >= hands) {
    Atomics.notify(barrier, 0);
    return;
  }
  for (let there = Atomics.load(barrier, 0); there < hands; there = Atomics.load(barrier, 0)) {
    // A worker that ended will not come: the page is told, and starts anew.
    if (Atomics.wait(barrier, 0, there, LONGEST_WAIT_MS) === 'timed-out')
      throw new Error('a drawing worker is missing');
  }
}

function toneTo(sumsAt: readonly number[], imageAt: number, message: Draw, [from, to]: Finish['rows']): void {
  const { width, height } = message;
  const buffer = memory!.buffer;
  if (kernel) {
    kernel.toneRows(sumsAt, TABLE_AT, imageAt, width, from, to);
    return;
  }
  const sums = sumsAt.map((at) => new Float32Array(buffer, at, sumsLength(width, height)));
  const table = new Uint32Array(buffer, TABLE_AT, VALUE_STEPS * LIGHT_STEPS);
  toneRows(sums, table, new Uint32Array(buffer, imageAt, width * height), width, from, to);
}

function draw(message: Draw): void {
  const { id, finish } = message;
  const start = performance.now();
  splatRuns(message);
  const milliseconds = performance.now() - start;
  if (finish?.tone)
    toneTable(finish.tone, new Uint32Array(memory!.buffer, TABLE_AT, VALUE_STEPS * LIGHT_STEPS));
  if (finish && isShared) {
    meet(finish.hands);
    toneTo(finish.allSumsAt, finish.imageAt, message, finish.rows);
  } else if (finish) {
    const { width, height } = message;
    const room = ownRoom(width, height);
    toneTo([room.sumsAt], room.imageAt, message, finish.rows);
    const image = new Uint32Array(memory!.buffer, room.imageAt, width * height).slice();
    answer({ kind: 'image', id, image, milliseconds }, [image.buffer]);
    return;
  }
  answer({ kind: 'done', id, milliseconds });
}

function fill(message: Extract<ToWorker, { kind: 'fill' }>): void {
  for (const name of ['x', 'y', 'z', 'radius', 'value'] as const) {
    const part = message[name];
    if (part) points![name].set(part, message.at);
  }
}

async function handle(message: ToWorker): Promise<void> {
  const { id } = message;
  switch (message.kind) {
    case 'shared':
      await take(message.memory, true, message.layout, message.scratchAt, message.wide);
      answer({ kind: 'done', id, wide: kernel !== null });
      return;
    case 'own': {
      const at = pointLayout(message.slots, RESERVED_BYTES);
      const own = new WebAssembly.Memory({ initial: Math.ceil(at.end / PAGE_BYTES) });
      await take(own, false, at, SCRATCH_AT, message.wide);
      points!.radius.fill(Number.NaN);
      answer({ kind: 'done', id, wide: kernel !== null });
      return;
    }
    case 'fill':
      fill(message);
      answer({ kind: 'done', id });
      return;
    case 'draw':
      draw(message);
      return;
    case 'pick': {
      let hit = null;
      for (const { from, to, matrix } of message.runs) {
        hit = pickPoint(points!, matrix, from, to, message.xPx, message.yPx, message.reachPx, hit);
      }
      answer({ kind: 'hit', id, hit });
      return;
    }
  }
}

addEventListener('message', (event: MessageEvent<ToWorker>) => {
  handle(event.data).catch((error: unknown) => {
    answer({
      kind: 'failed',
      id: event.data.id,
      reason: error instanceof Error ? error.message : String(error),
    });
  });
});
