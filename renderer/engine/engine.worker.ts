import { Refusal } from '../../shared-core/base/refusal.ts';
import { EngineDesk } from './desk.ts';
import type { EngineAnswer, EngineEvent, EngineRequest } from './protocol.ts';
import { regionTrouble } from './regionReady.ts';
import { sentenceOf } from './sentenceOf.ts';
import { sharedSample } from './sharedSample.ts';

// A worker entry is a few lines around the desk: it only carries messages.
const scope = self as unknown as DedicatedWorkerGlobalScope;
const post = (message: EngineEvent | EngineAnswer) => scope.postMessage(message, transferable(message));

const desk = new EngineDesk({
  emit: post,
  openUrl: async (url, signal) => {
    const gone = "The catalogue's file cannot be read any more, it was moved or changed: open it again.";
    const response = await fetch(url, signal === undefined ? {} : { signal }).catch(() => {
      throw new Refusal(gone);
    });
    if (!response.ok || response.body === null) throw new Refusal(gone);
    return response.body as unknown as AsyncIterable<Uint8Array>;
  },
  floats: (length) =>
    scope.crossOriginIsolated
      ? new Float32Array(new SharedArrayBuffer(4 * length))
      : new Float32Array(length),
  share: (sample) => (scope.crossOriginIsolated ? sharedSample(sample) : sample),
  breathe: () => new Promise((resume) => setTimeout(resume, 0)),
});

// Page arrays are moved, not copied. The sample stays here too (rows are looked up in it), so it is copied once.
function transferable(message: EngineEvent | EngineAnswer): Transferable[] {
  const arrays: Float32Array[] = [];
  if (message.kind === 'selected' && message.selected !== null) {
    const { directions, raDeg, decDeg, magnitude } = message.selected;
    arrays.push(directions.x, directions.y, directions.z, raDeg, decDeg);
    if (magnitude !== null) arrays.push(magnitude);
  }
  if (message.kind === 'background' && message.background !== null)
    arrays.push(message.background.comovingMpc, message.background.lookbackGyr);
  if (message.kind === 'density' && message.density !== null) arrays.push(message.density);
  if (message.kind === 'columns') arrays.push(...message.columns.map((column) => column.values));
  return arrays.map((a) => a.buffer).filter((b): b is ArrayBuffer => b instanceof ArrayBuffer);
}

async function answer(id: number, work: () => unknown) {
  try {
    post({ kind: 'answer', id, value: (await work()) as never });
  } catch (error) {
    post({ kind: 'refused', id, sentence: sentenceOf(error) });
  }
}

scope.onmessage = ({ data }: MessageEvent<EngineRequest>) => {
  switch (data.kind) {
    case 'want':
      void desk.want(data.wanted, data.serial);
      break;
    case 'row':
      void answer(data.id, () => desk.row(data.index));
      break;
    case 'name':
      void answer(data.id, () => desk.name(data.line));
      break;
    case 'preview':
      void answer(data.id, () => desk.preview(data.source));
      break;
    case 'checkRegions':
      void answer(data.id, () => regionTrouble(data.regions));
      break;
    case 'setAsideList':
      void answer(data.id, async () => new Blob(await desk.setAsideList(), { type: 'text/csv' }));
      break;
    case 'repeatsList':
      void answer(data.id, async () => new Blob(await desk.repeatsList(), { type: 'text/csv' }));
      break;
  }
};
