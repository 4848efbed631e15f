import { throwIfCancelled } from '../../../shared-core/base/cancelled.ts';
import { Refusal } from '../../../shared-core/base/refusal.ts';
import { checkFilmSize, filmFrames, frameStartUs } from '../../../shared-core/picture/film.ts';
import type { FilmFormat } from '../../../shared-core/picture/job.ts';
import { eachBand } from '../renderPng.ts';
import type { Scene } from '../scene.ts';
import type { ByteSink, WriteOptions } from '../write/sink.ts';
import type { Film } from './composeFilm.ts';
import { filmEncoding } from './encoding.ts';
import { type EncodedPart, FrameEncoder } from './frameEncoder.ts';
import type { FilmFacts, FilmFile } from './write/filmFile.ts';
import { Mp4File } from './write/mp4.ts';
import { WebmFile } from './write/webm.ts';
import { YuvFrame } from './yuv.ts';

/** A player finds its place at a key frame: one every so many seconds. */
const KEY_EVERY_SECONDS = 2;
const BAND_PIXELS = 1_200_000;

/**
 * Writes a film frame by frame as WebM (VP9) or MP4 (H.264); memory does not grow with its length. The frames are the
 * same at every run of one browser.
 *
 * @throws Cancelled once the signal is up; Refusal where the browser cannot encode it, before anything is written, or
 * memory runs short
 */
export async function renderFilm(
  film: Film,
  format: FilmFormat,
  sink: ByteSink,
  { signal, onProgress }: WriteOptions = {},
): Promise<void> {
  const { options, widthPx, heightPx, metadata } = film;
  checkFilmSize(widthPx, heightPx);
  const { framesPerSecond } = options;
  const frames = filmFrames(options);
  const facts: FilmFacts = { widthPx, heightPx, frames, framesPerSecond, metadata };
  const encoding = await filmEncoding(format, facts);
  const encoder = new FrameEncoder(encoding);
  const output = new FilmOutput(format, sink, facts);
  const keyEvery = Math.max(1, Math.round(KEY_EVERY_SECONDS * framesPerSecond));
  try {
    for (let frame = 0; frame < frames; frame++) {
      // Messages arrive between frames: a cancel above all.
      await new Promise((resume) => setTimeout(resume, 0));
      throwIfCancelled(signal);
      const yuv = await drawn(film.sceneAt(frame), signal);
      const start = frameStartUs(options, frame);
      const duration = frameStartUs(options, frame + 1) - start;
      await encoder.add(yuv.bytes, start, duration, frame % keyEvery === 0);
      await output.write(encoder.taken());
      onProgress?.((frame + 1) / frames);
    }
    await encoder.flush();
    await output.write(encoder.taken());
    await output.end();
  } finally {
    encoder.close();
  }
}

/** The finished colours of one frame. */
async function drawn(scene: Scene, signal: WriteOptions['signal']): Promise<YuvFrame> {
  const { widthPx, heightPx } = scene;
  const yuv = new YuvFrame(widthPx, heightPx);
  // Bands of whole pairs of rows, since a colour is stored for two.
  const rows = 2 * Math.max(4, Math.floor(BAND_PIXELS / widthPx / 2));
  let top = 0;
  const take = (rgba: Uint8ClampedArray): Promise<void> => {
    yuv.put(rgba, top);
    top += rgba.length / (4 * widthPx);
    return Promise.resolve();
  };
  await eachBand(scene, signal === undefined ? {} : { signal }, take, rows * widthPx);
  return yuv;
}

/** The film's file, opened with what the encoder tells with its first frame. */
class FilmOutput {
  private file: FilmFile | null = null;
  private readonly format: FilmFormat;
  private readonly sink: ByteSink;
  private readonly facts: FilmFacts;

  constructor(format: FilmFormat, sink: ByteSink, facts: FilmFacts) {
    this.format = format;
    this.sink = sink;
    this.facts = facts;
  }

  async write(parts: readonly EncodedPart[]): Promise<void> {
    for (const { frame, description } of parts) {
      this.file ??= await this.open(description);
      await this.file.add(frame);
    }
  }

  async end(): Promise<void> {
    if (this.file === null)
      throw new Refusal("The browser's encoder gave no frame: choose the other format.");
    await this.file.end();
  }

  private async open(description: Uint8Array | null): Promise<FilmFile> {
    if (this.format === 'webm') return await WebmFile.open(this.sink, this.facts);
    if (description === null)
      throw new Refusal("The browser's encoder does not tell how it codes H.264: choose WebM.");
    return await Mp4File.open(this.sink, this.facts, description);
  }
}
