import { EngineDesk } from '../../renderer/engine/desk.ts';
import type { EngineEvent, EngineRequest } from '../../renderer/engine/protocol.ts';
import type { Surroundings } from '../../renderer/engine/surroundings.ts';

/** The engine's own desk in place of a thread: it takes wishes alone. @param around what a test has otherwise */
export function deskWorker(
  openUrl: Surroundings['openUrl'],
  around: Partial<Surroundings> = {},
): () => Worker {
  return () => {
    const worker = { onmessage: null as ((event: { data: EngineEvent }) => void) | null };
    const desk = new EngineDesk({
      emit: (data) => worker.onmessage?.({ data }),
      openUrl,
      floats: (length) => new Float32Array(length),
      share: (sample) => sample,
      breathe: () => new Promise((resume) => setTimeout(resume, 0)),
      ...around,
    });
    const postMessage = (request: EngineRequest) => {
      if (request.kind === 'want') void desk.want(request.wanted, request.serial);
    };
    const terminate = () => void (worker.onmessage = null);
    return Object.assign(worker, { postMessage, terminate }) as unknown as Worker;
  };
}
