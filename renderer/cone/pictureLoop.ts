/** So long after the last touch the picture counts as at rest. */
const REST_MS = 140;
/** Pictures are drawn to the beat of the screen while they are quicker than this. */
const BEAT_MS = 14;

/** A picture of one moment: the points first, then what lies over them. */
export interface Picture {
  /** It moves by itself: another must follow. */
  readonly animated: boolean;
  /** All points as fine as they can be drawn; if not, another follows at rest. */
  readonly whole: boolean;
  /** The points on screen are this picture's already. */
  readonly pointsStand: boolean;
  /** False when it was stopped and the old picture stands. */
  drawPoints(stop: () => boolean): Promise<boolean>;
  /** What lies over the points just shown. @param latencyMs since the picture was asked for */
  finish(latencyMs: number): void;
}

/** Draws when something changed, one picture at a time, and never in a loop. */
export class PictureLoop {
  private readonly next: (now: number, touched: boolean) => Picture;
  private frameRequest = 0;
  private restTimer = 0;
  private drawing = false;
  private again = false;
  private touchedAt = Number.NEGATIVE_INFINITY;
  /** When the picture being drawn was asked for, and the one after it. */
  private requestedAt = 0;
  private askedAt = 0;
  private disposed = false;

  /** @param next makes the picture of a moment; `touched` while a hand moves it */
  constructor(next: (now: number, touched: boolean) => Picture) {
    this.next = next;
  }

  /** A hand is on the picture: until it rests, pictures are to be quick. */
  touch(): void {
    this.touchedAt = performance.now();
  }

  invalidate(): void {
    if (this.drawing && !this.again) this.askedAt = performance.now();
    if (this.drawing) this.again = true;
    if (this.frameRequest !== 0 || this.drawing || this.disposed) return;
    this.requestedAt = performance.now();
    this.frameRequest = requestAnimationFrame(() => {
      this.frameRequest = 0;
      this.draw();
    });
  }

  dispose(): void {
    this.disposed = true;
    cancelAnimationFrame(this.frameRequest);
    clearTimeout(this.restTimer);
  }

  private draw(): void {
    // One picture at a time: what is asked meanwhile comes right after it.
    if (this.drawing) {
      this.again = true;
      return;
    }
    this.drawing = true;
    const startedAt = performance.now();
    const picture = this.next(startedAt, startedAt - this.touchedAt < REST_MS);
    // What changed up to here is in this picture.
    this.again = false;
    if (picture.pointsStand) {
      this.drawing = false;
      this.finish(picture, performance.now() - this.requestedAt);
      if (picture.animated) this.invalidate();
      return;
    }
    picture
      .drawPoints(() => this.again)
      .then(
        (shown) => this.pointsDrawn(picture, shown, startedAt),
        () => {
          // Workers that ended are replaced by the painter, which has asked for a new picture.
          this.drawing = false;
          if (this.again) this.invalidate();
        },
      );
  }

  private pointsDrawn(picture: Picture, shown: boolean, startedAt: number): void {
    this.drawing = false;
    if (this.disposed) return;
    const latencyMs = performance.now() - this.requestedAt;
    const next = this.again || picture.animated;
    // A picture that took longer than the screen's beat does not wait for the next one: the workers go on with
    // what was asked meanwhile while the page finishes this one.
    const atOnce = next && performance.now() - startedAt > BEAT_MS;
    if (atOnce) {
      this.requestedAt = this.again ? this.askedAt : performance.now();
      this.draw();
      // Nothing of the points had changed: that picture is finished already, and newer.
      if (!this.drawing) return;
    }
    if (shown) this.finish(picture, latencyMs);
    if (next && !atOnce) this.invalidate();
  }

  private finish(picture: Picture, latencyMs: number): void {
    picture.finish(latencyMs);
    clearTimeout(this.restTimer);
    if (!picture.animated && !picture.whole)
      this.restTimer = window.setTimeout(() => this.invalidate(), REST_MS);
  }
}
