import { Refusal } from '../../../shared-core/base/refusal.ts';
import type { FilmEncoding } from './encoding.ts';
import type { EncodedFrame } from './write/filmFile.ts';

/** Frames that wait for the encoder: more would only take memory. */
const MOST_WAITING = 3;
const BT709 = { primaries: 'bt709', transfer: 'bt709', matrix: 'bt709', fullRange: false } as const;

/** What came out of the encoder: frames in order, and for H.264 the decoder's configuration with the first. */
export interface EncodedPart {
  readonly frame: EncodedFrame;
  readonly description: Uint8Array | null;
}

/** A browser's encoder with a line of frames before it and one after it. End it by `close`. */
export class FrameEncoder {
  private readonly encoder: VideoEncoder;
  private readonly encoding: FilmEncoding;
  private done: EncodedPart[] = [];
  private failure: Refusal | null = null;
  private wake: () => void = () => undefined;
  private latestUs = Number.NEGATIVE_INFINITY;

  constructor(encoding: FilmEncoding) {
    this.encoding = encoding;
    this.encoder = new VideoEncoder({
      output: (chunk, metadata) => {
        // Neither container is told times of its own for each frame: they stand in the order of showing.
        if (chunk.timestamp <= this.latestUs)
          this.failure ??= new Refusal(
            "The browser's encoder gives frames out of their order, which these films cannot hold: choose the other format.",
          );
        this.latestUs = chunk.timestamp;
        const bytes = new Uint8Array(chunk.byteLength);
        chunk.copyTo(bytes);
        const description = metadata?.decoderConfig?.description;
        this.done.push({
          frame: { bytes, key: chunk.type === 'key' },
          description: description === undefined ? null : bytesOf(description),
        });
        this.wake();
      },
      error: (error) => {
        this.failure = new Refusal(
          `The browser's encoder gave up (${error.message}): choose a smaller size, or the other format.`,
        );
        this.wake();
      },
    });
    this.encoder.ondequeue = () => this.wake();
    this.encoder.configure(encoding.config);
  }

  /** Gives a frame, and waits while too many are before it. @throws Refusal once the encoder has given up */
  async add(yuv: Uint8Array<ArrayBuffer>, startUs: number, durationUs: number, key: boolean): Promise<void> {
    while (this.failure === null && this.encoder.encodeQueueSize >= MOST_WAITING) await this.change();
    this.check();
    const { width, height } = this.encoding.config;
    const frame = new VideoFrame(yuv, {
      format: 'I420',
      codedWidth: width,
      codedHeight: height,
      timestamp: startUs,
      duration: durationUs,
      colorSpace: BT709,
    });
    const { quantizer } = this.encoding;
    try {
      this.encoder.encode(frame, { keyFrame: key, ...(quantizer === null ? {} : { vp9: { quantizer } }) });
    } finally {
      frame.close();
    }
  }

  /** What has come out since it was last asked. */
  taken(): EncodedPart[] {
    const { done } = this;
    this.done = [];
    return done;
  }

  /** Waits for all frames that were given. @throws Refusal once the encoder has given up */
  async flush(): Promise<void> {
    await this.encoder.flush().catch(() => undefined);
    this.check();
  }

  close(): void {
    if (this.encoder.state !== 'closed') this.encoder.close();
  }

  private check(): void {
    if (this.failure !== null) throw this.failure;
    if (this.encoder.state === 'closed')
      throw new Refusal("The browser's encoder ended early: try again, or choose a smaller size.");
  }

  private change(): Promise<void> {
    return new Promise((resolve) => {
      this.wake = resolve;
    });
  }
}

const bytesOf = (source: AllowSharedBufferSource): Uint8Array =>
  ArrayBuffer.isView(source)
    ? new Uint8Array(source.buffer, source.byteOffset, source.byteLength).slice()
    : new Uint8Array(source).slice();
