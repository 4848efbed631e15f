import { type ConeFrame, coneFrame, emphasisOf, partsOf, pixelOf } from './coneFrame.ts';
import type { ConeLayers } from './coneLayers.ts';
import type { ConeLook } from './coneLook.ts';
import type { ConeModel } from './coneModel.ts';
import type { GlStage } from './graphics/glStage.ts';
import type { Picture } from './pictureLoop.ts';
import type { Pointing } from './pointing.ts';
import { type PointFrame, pictureKey } from './points/pointLayer.ts';
import type { PointPainter } from './points/pointPainter.ts';
import type { Stage } from './stage.ts';
import type { ConeEvents } from './types.ts';

interface Sources {
  readonly stage: Stage;
  readonly gl: GlStage;
  readonly model: ConeModel;
  readonly look: ConeLook;
  readonly painter: PointPainter;
  readonly layers: ConeLayers;
  readonly pointing: Pointing;
  readonly events: ConeEvents;
}

/** Makes the pictures of the cone: what is in one, and how its layers come about. */
export class ConePictures {
  private readonly sources: Sources;
  private drawnKey = '';
  private toldState = '';
  private toldMarks = '';

  constructor(sources: Sources) {
    this.sources = sources;
  }

  /** Matrices of a moment. */
  frame(now: number): ConeFrame {
    const { model, stage, look } = this.sources;
    return coneFrame(model, stage, now, look.light.depthCue);
  }

  /** The points on screen are not to be kept, whatever the next picture is. */
  forgetPoints(): void {
    this.drawnKey = '';
  }

  /** The picture of a moment. @param touched a hand moves it */
  next(now: number, touched: boolean): Picture {
    const { stage, model, look, painter, layers } = this.sources;
    const frame = this.frame(now);
    const animated = model.moving(now);
    painter.galaxies.setTable(frame.shown.table, animated);
    const moving = animated || touched;
    const points = this.pointFrame(frame, moving);
    const key = pictureKey(points, `${painter.version} ${look.version}`);
    const software = painter.layer === 'software';
    const whole = points.fraction === 1 && points.pixelRatio === stage.pixelRatio;
    return {
      animated,
      whole,
      pointsStand: software && key === this.drawnKey,
      drawPoints: (stop) => {
        if (!software) layers.clear(points.tone.background);
        return painter.draw(points, stop).then(
          (shown) => {
            if (shown) this.drawnKey = key;
            if (shown && painter.galaxies.store) this.sources.events.onTrouble?.(null);
            if (shown && moving) painter.pacing.finished(performance.now());
            return shown;
          },
          (error) => {
            this.forgetPoints();
            // The workers' memory cannot grow; those that ended are replaced, and say nothing here.
            if (error instanceof RangeError)
              this.sources.events.onTrouble?.(
                `Memory ran short for a picture of ${stage.widthPx} by ${stage.heightPx}: make the window smaller, or close other programs. All numbers stand.`,
              );
            throw error;
          },
        );
      },
      finish: (latencyMs) => this.finish(frame, points, latencyMs, !animated && whole),
    };
  }

  private pointFrame(frame: ConeFrame, moving: boolean): PointFrame {
    const { stage, look, painter } = this.sources;
    const { widthPx, heightPx, pixelRatio } = stage;
    const parts = partsOf(frame, painter.galaxies);
    const emphasis = emphasisOf(frame, look.shells);
    return painter.frame(parts, { widthPx, heightPx }, pixelRatio, look.ofPoints(), emphasis, moving);
  }

  /** Solids, lines and labels over the points just shown, for the same moment. */
  private finish(frame: ConeFrame, points: PointFrame, latencyMs: number, atRest: boolean): void {
    const { gl, model, look, painter, layers, pointing, events } = this.sources;
    const start = performance.now();
    const { image, galaxies } = painter;
    const over = look.overPoints(pointing.hovered);
    if (image) layers.drawTogether(image, points.pixelRatio, frame, model, over, galaxies);
    else layers.drawAbove(frame, model, over, galaxies);
    this.tellState();
    if (atRest) this.tellMarks(frame);
    if (galaxies.store) gl.look();
    events.onFrame?.({
      drawn: Math.round(points.parts.reduce((sum, part) => sum + part.range.count, 0) * points.fraction),
      total: galaxies.store?.count ?? 0,
      milliseconds: latencyMs + performance.now() - start,
      layer: painter.layer,
      atRest,
    });
  }

  private tellMarks(frame: ConeFrame): void {
    const { look, painter, events } = this.sources;
    const places = look.picked.flatMap((index) => {
      const place = pixelOf(index, frame, painter.galaxies);
      return place === null ? [] : [{ index, xPx: place[0], yPx: place[1] }];
    });
    const text = JSON.stringify(places);
    if (text === this.toldMarks) return;
    this.toldMarks = text;
    events.onMarksMoved?.(places);
  }

  private tellState(): void {
    const state = this.sources.model.state();
    const text = JSON.stringify(state);
    if (text === this.toldState) return;
    this.toldState = text;
    this.sources.events.onViewChanged?.(state);
  }
}
