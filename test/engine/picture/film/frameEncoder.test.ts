import { afterEach, expect, it, vi } from 'vitest';
import { FrameEncoder } from '../../../../renderer/picture/film/frameEncoder.ts';

afterEach(() => void vi.unstubAllGlobals());

/** A browser whose encoder gives frames in an order of its own once all are there. */
function encoderGiving(order: readonly number[]): FrameEncoder {
  vi.stubGlobal(
    'VideoFrame',
    class {
      close(): void {}
    },
  );
  vi.stubGlobal(
    'VideoEncoder',
    class {
      state = 'configured';
      encodeQueueSize = 0;
      private readonly init: VideoEncoderInit;
      constructor(init: VideoEncoderInit) {
        this.init = init;
      }
      configure(): void {}
      encode(): void {}
      async flush(): Promise<void> {
        for (const timestamp of order)
          this.init.output(
            {
              byteLength: 1,
              timestamp,
              type: 'key',
              copyTo: (to: Uint8Array) => void to.fill(timestamp),
            } as never,
            {},
          );
      }
    },
  );
  return new FrameEncoder({ config: { codec: 'x', width: 2, height: 2 }, quantizer: null });
}

async function encoded(order: readonly number[]): Promise<number[]> {
  const encoder = encoderGiving(order);
  for (const start of [0, 1, 2]) await encoder.add(new Uint8Array(6), start, 1, start === 0);
  await encoder.flush();
  return encoder.taken().map(({ frame }) => frame.bytes[0]!);
}

it('takes frames in the order of showing, and refuses an encoder that gives them in another', async () => {
  expect(await encoded([0, 1, 2])).toEqual([0, 1, 2]);
  await expect(encoded([0, 2, 1])).rejects.toThrow(/out of their order.*choose the other format/);
});
