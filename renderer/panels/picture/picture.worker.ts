import { fingerprintOf } from '../../picture/page/gatherFacts.ts';
import type { BenchAnswer, BenchRequest } from './benchMessages.ts';
import { PictureDesk } from './pictureDesk.ts';

// A worker entry is a few lines around the desk: it only carries messages.
const scope = self as unknown as DedicatedWorkerGlobalScope;

const desk = new PictureDesk((answer: BenchAnswer) => {
  const moved =
    answer.kind === 'piece'
      ? [answer.bytes.buffer]
      : answer.kind === 'preview'
        ? [answer.preview.png.buffer]
        : [];
  scope.postMessage(answer, moved);
}, fingerprintOf);

scope.onmessage = ({ data }: MessageEvent<BenchRequest>) => void desk.take(data);
