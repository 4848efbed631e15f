import { afterEach, expect, it, vi } from 'vitest';
import { askEncoders } from '../../../renderer/panels/picture/filmTroubles.ts';

afterEach(() => vi.unstubAllGlobals());

it('asks the encoders once for a size, and again for another', async () => {
  const asked: string[] = [];
  const isConfigSupported = async ({ codec, width }: VideoEncoderConfig) => {
    asked.push(`${codec.slice(0, 4)} ${width}`);
    return { supported: codec.startsWith('vp09') };
  };
  vi.stubGlobal('VideoEncoder', { isConfigSupported });
  const troubles = askEncoders((fault) => (fault as Error).message);
  const size = { widthPx: 640, heightPx: 360 };
  const first = await troubles(size, 30);
  expect(first).toEqual({ webm: null, mp4: expect.stringMatching(/cannot encode H\.264 at 640 x 360/) });
  const once = [...asked];
  expect(new Set(once)).toEqual(new Set(['vp09 640', 'avc1 640']));
  expect(await troubles({ ...size }, 30)).toEqual(first);
  expect(asked).toEqual(once);
  await troubles({ widthPx: 1280, heightPx: 720 }, 30);
  await troubles(size, 25);
  expect(asked.slice(once.length)).toEqual(expect.arrayContaining(['vp09 1280', 'vp09 640']));
});
