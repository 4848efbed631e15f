import { Cancelled } from '../../../shared-core/base/cancelled.ts';
import { Refusal } from '../../../shared-core/base/refusal.ts';
import type { FilmOptions } from '../../../shared-core/picture/film.ts';
import { isFilmFormat } from '../../../shared-core/picture/job.ts';
import type { PictureOptions } from '../../../shared-core/picture/options.ts';
import { captionOffer, composePicture, describePicture } from '../../picture/composePicture.ts';
import { composeFilm, type Film } from '../../picture/film/composeFilm.ts';
import { renderFilm } from '../../picture/film/renderFilm.ts';
import type { PictureFacts } from '../../picture/numbers.ts';
import { PieceSender } from '../../picture/page/pieceSender.ts';
import { renderPng } from '../../picture/renderPng.ts';
import type { Scene } from '../../picture/scene.ts';
import { sceneToPdf } from '../../picture/sceneToPdf.ts';
import { sceneToSvg } from '../../picture/sceneToSvg.ts';
import { type ByteSink, MemorySink, type WriteOptions } from '../../picture/write/sink.ts';
import type { BenchAnswer, BenchRequest, PicturePreview } from './benchMessages.ts';
import { askEncoders } from './filmTroubles.ts';
import { previewScene } from './previewScene.ts';

const WRITERS = { png: renderPng, svg: sceneToSvg, pdf: sceneToPdf } as const;
/** How long a file is written before the worker listens again, for a cancel above all. */
const LISTEN_AFTER_MS = 30;

interface Running {
  aborted: boolean;
  /** Called when the page has taken a piece, and when it gives up. */
  wake: () => void;
}

/** Draws previews and writes files away from the page, one request at a time. */
export class PictureDesk {
  readonly #post: (answer: BenchAnswer) => void;
  readonly #fingerprint: (study: PictureFacts['study']) => string;
  #facts: PictureFacts | null = null;
  #newest = 0;
  #film: { readonly facts: PictureFacts; readonly key: string; readonly film: Film } | null = null;
  readonly #encoderTroubles = askEncoders(sentenceFor);
  #offer: { readonly facts: PictureFacts; readonly key: string; readonly caption: string } | null = null;
  readonly #running = new Map<number, Running>();

  constructor(post: (answer: BenchAnswer) => void, fingerprint: (study: PictureFacts['study']) => string) {
    this.#post = post;
    this.#fingerprint = fingerprint;
  }

  async take(request: BenchRequest): Promise<void> {
    switch (request.kind) {
      case 'facts':
        this.#facts = { ...request.facts, fingerprint: this.#fingerprint(request.facts.study) };
        return;
      case 'preview':
        this.#newest = request.id;
        await this.#guarded(request.id, () => this.#preview(request));
        return;
      case 'export':
        await this.#guarded(request.id, () => this.#export(request));
        return;
      case 'more':
        this.#running.get(request.id)?.wake();
        return;
      case 'cancel': {
        const running = this.#running.get(request.id);
        if (running === undefined) return;
        running.aborted = true;
        running.wake();
      }
    }
  }

  async #guarded(id: number, work: () => Promise<void>): Promise<void> {
    try {
      await work();
    } catch (error) {
      this.#post(
        error instanceof Cancelled
          ? { kind: 'cancelled', id }
          : { kind: 'refused', id, sentence: sentenceFor(error) },
      );
    }
  }

  #factsAtHand(): PictureFacts {
    if (this.#facts === null) throw new Refusal('There is no study to draw yet: open one.');
    return this.#facts;
  }

  async #preview({ id, options, moment, room }: Extract<BenchRequest, { kind: 'preview' }>): Promise<void> {
    await breathe();
    if (id !== this.#newest) {
      this.#post({ kind: 'superseded', id });
      return;
    }
    const facts = this.#factsAtHand();
    const film = moment === null ? null : this.#filmFor(options, moment.film, facts);
    const began = performance.now();
    const scene = film?.sceneAt(moment!.frame) ?? composePicture(options, facts);
    const seen = previewScene(scene, room);
    const sink = new MemorySink();
    await renderPng(seen, sink);
    const share = (seen.widthPx * seen.heightPx) / (scene.widthPx * scene.heightPx);
    const preview: PicturePreview = {
      png: sink.bytes(),
      description: describePicture(scene),
      offeredCaption: film?.offeredCaption ?? this.#captionFor(options, facts),
      pdfTrouble: film === null ? await pdfTrouble(scene) : null,
      forecast:
        film === null
          ? null
          : {
              troubles: await this.#encoderTroubles(film, film.options.framesPerSecond),
              secondsAFrame: (performance.now() - began) / 1000 / share,
            },
    };
    this.#post({ kind: 'preview', id, preview });
  }

  /** The film is kept while one looks at its frames: to lay it out takes longer than to draw one. */
  #filmFor(options: PictureOptions, film: FilmOptions, facts: PictureFacts): Film {
    const key = JSON.stringify([options, film]);
    if (this.#film?.facts !== facts || this.#film.key !== key)
      this.#film = { facts, key, film: composeFilm(options, film, facts) };
    return this.#film.film;
  }

  /** Light, labels and words do not change what a caption must tell, and to ask again takes a drawing. */
  #captionFor(options: PictureOptions, facts: PictureFacts): string {
    const key = JSON.stringify({
      ...options,
      caption: null,
      credit: '',
      labels: [],
      stretch: null,
      exposureStops: null,
      glow: null,
      depthCue: null,
      pointSize: null,
      colourMap: null,
    });
    if (this.#offer?.facts !== facts || this.#offer.key !== key)
      this.#offer = { facts, key, caption: captionOffer(options, facts) };
    return this.#offer.caption;
  }

  async #export({ id, format, options, film }: Extract<BenchRequest, { kind: 'export' }>): Promise<void> {
    const running: Running = { aborted: false, wake: () => undefined };
    this.#running.set(id, running);
    try {
      const sender = new PieceSender(async (bytes) => {
        if (running.aborted) throw new Cancelled();
        const taken = new Promise<void>((resolve) => {
          running.wake = resolve;
        });
        this.#post({ kind: 'piece', id, bytes });
        await taken;
        if (running.aborted) throw new Cancelled();
      });
      const how: WriteOptions = {
        signal: running,
        onProgress: (fraction) => this.#post({ kind: 'progress', id, fraction }),
      };
      const facts = this.#factsAtHand();
      if (!isFilmFormat(format))
        await WRITERS[format](composePicture(options, facts), listening(sender), how);
      else if (film !== null) await renderFilm(this.#filmFor(options, film, facts), format, sender, how);
      else throw new Refusal('There is no film to write: choose one.');
      await sender.end();
      this.#post({ kind: 'done', id });
    } finally {
      this.#running.delete(id);
    }
  }
}

const breathe = (): Promise<void> => new Promise((resume) => setTimeout(resume, 0));

/** The sink, with a moment in which messages arrive every now and then. */
function listening(sink: ByteSink): ByteSink {
  let last = performance.now();
  return {
    async write(bytes) {
      await sink.write(bytes);
      if (performance.now() - last < LISTEN_AFTER_MS) return;
      await breathe();
      last = performance.now();
    },
  };
}

class Begun extends Error {}

/** Why a scene cannot be a PDF: the writer says so before its first byte, and no more is asked of it here. */
async function pdfTrouble(scene: Scene): Promise<string | null> {
  try {
    await sceneToPdf(scene, { write: () => Promise.reject(new Begun()) });
    return null;
  } catch (error) {
    if (error instanceof Begun) return null;
    return sentenceFor(error);
  }
}

function sentenceFor(error: unknown): string {
  if (error instanceof Refusal) return error.message;
  const said = error instanceof Error ? error.message : String(error);
  if (error instanceof RangeError && /alloc|length|size/i.test(said))
    return 'Memory ran short for this picture: close other programs, or choose a smaller size.';
  return `The picture could not be drawn (${said}): choose other options, or save the study and start again.`;
}
