import { Refusal } from '../../../shared-core/base/refusal.ts';
import type { FilmFormat } from '../../../shared-core/picture/job.ts';
import { h264Codecs, MOST_H264_BITS, vp9Codec } from './levels.ts';
import type { FilmFacts } from './write/filmFile.ts';

/** How the frames of a film are coded. */
export interface FilmEncoding {
  readonly config: VideoEncoderConfig;
  /** Every frame's quantizer (lower is finer); null where the encoder shares out bits itself. */
  readonly quantizer: number | null;
}

/** Every frame's quantizer for VP9 (0..63): looked at on moving points and thin lines, which stay as they were drawn. */
const VP9_QUANTIZER = 60;
/** Bits for a pixel of each frame, at most, where the encoder shares them out: with fewer, thin lines lose their colour. */
const BITS_A_PIXEL = 1.6;

/**
 * The encoding of a format that this browser can do: VP9 for WebM, H.264 for MP4, by the processor rather than by
 * whatever graphics card there is.
 *
 * @throws Refusal where it can do none
 */
export async function filmEncoding(
  format: FilmFormat,
  { widthPx, heightPx, framesPerSecond }: Pick<FilmFacts, 'widthPx' | 'heightPx' | 'framesPerSecond'>,
): Promise<FilmEncoding> {
  const size = { widthPx, heightPx, framesPerSecond };
  const common = {
    width: widthPx,
    height: heightPx,
    framerate: framesPerSecond,
    latencyMode: 'quality',
    hardwareAcceleration: 'prefer-software',
  } as const;
  const bitrate = Math.round(Math.min(MOST_H264_BITS, BITS_A_PIXEL * widthPx * heightPx * framesPerSecond));
  const shared = { bitrateMode: 'variable', bitrate } as const;
  const vp9 = { ...common, codec: vp9Codec(size) };
  const wishes: FilmEncoding[] =
    format === 'webm'
      ? [
          { config: { ...vp9, bitrateMode: 'quantizer' }, quantizer: VP9_QUANTIZER },
          { config: { ...vp9, ...shared }, quantizer: null },
        ]
      : h264Codecs(size, bitrate).map((codec) => ({
          config: { ...common, ...shared, codec, avc: { format: 'avc' } },
          quantizer: null,
        }));
  for (const wish of wishes) if (await isSupported(wish.config)) return wish;
  throw new Refusal(
    format === 'mp4'
      ? `This browser cannot encode H.264 at ${widthPx} x ${heightPx}, which an MP4 film needs: choose WebM (a name that ends in .webm).`
      : `This browser cannot encode VP9 at ${widthPx} x ${heightPx}, which a WebM film needs: use a newer Chromium, Chrome or Edge, or choose a smaller size.`,
  );
}

async function isSupported(config: VideoEncoderConfig): Promise<boolean> {
  if (typeof VideoEncoder === 'undefined') return false;
  try {
    return (await VideoEncoder.isConfigSupported(config)).supported === true;
  } catch {
    // A browser that does not know a word of the wish cannot fulfil it.
    return false;
  }
}
