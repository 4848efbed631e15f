import type { Triple } from '../colour/oklab.ts';
import { type ConeFrame, pixelOf } from './coneFrame.ts';
import type { ConeModel } from './coneModel.ts';
import { compose } from './geometry/projection.ts';
import type { ShellMesh } from './geometry/shellMesh.ts';
import type { GlStage } from './graphics/glStage.ts';
import { MergedCanvas } from './merged.ts';
import { paintOverlay } from './overlay/paintOverlay.ts';
import { Pen } from './overlay/pen.ts';
import type { Galaxies } from './points/galaxies.ts';
import { radiusAt } from './points/radiusTable.ts';
import { nextTask } from './points/slices.ts';
import { type FlatPlace, paintFlatSolids } from './solids/flatSolids.ts';
import type { SolidLook } from './solids/solidLook.ts';
import type { Stage } from './stage.ts';
import type { ConeTheme, RadialScaleInput, ShellsInput } from './types.ts';

/** What is drawn over the points. */
export interface LayerLook {
  readonly theme: ConeTheme;
  readonly scale: RadialScaleInput | null;
  readonly shells: ShellsInput;
  readonly colours: readonly Triple[];
  readonly hovered: number | null;
  readonly picked: readonly number[];
  readonly pairText: string;
}

/** Strength of a shell's glass on dark and light ground. */
const GLASS = { dark: 0.045, light: 0.06 } as const;

/**
 * Everything but the splatting of points: solids, lines, rulers and labels. With a GPU they are layers above the
 * points, the solids by three.js; without one all is drawn into one canvas.
 */
export class ConeLayers {
  /** The solids' shapes, one for each field. */
  meshes: readonly ShellMesh[] = [];
  private readonly stage: Stage;
  private readonly gl: GlStage;
  private readonly merged: MergedCanvas;

  constructor(stage: Stage, gl: GlStage) {
    this.stage = stage;
    this.gl = gl;
    this.merged = new MergedCanvas(stage.points);
  }

  /** Clears the WebGL canvas: to the ground where it carries the points, else to nothing. */
  clear(ground: Triple | null): void {
    this.gl.layers?.clear(this.stage, this.stage.pixelRatio, ground);
  }

  /** Over points that WebGL has drawn. */
  drawAbove(frame: ConeFrame, model: ConeModel, look: LayerLook, galaxies: Galaxies): void {
    const { overlay, solids, pixelRatio, widthPx, heightPx } = this.stage;
    this.drawSolids(frame, look);
    const context = overlay.getContext('2d');
    if (context) {
      this.stage.fit(overlay);
      context.setTransform(pixelRatio, 0, 0, pixelRatio, 0, 0);
      context.clearRect(0, 0, widthPx, heightPx);
      this.paint(context, frame, model, look, galaxies);
    }
    this.stage.show(solids, overlay);
  }

  /** Together with an image of the points, `ratio` of its pixels for one CSS pixel. */
  drawTogether(
    image: ImageData,
    ratio: number,
    frame: ConeFrame,
    model: ConeModel,
    look: LayerLook,
    galaxies: Galaxies,
  ): void {
    this.merged.show(image, ratio, (context) => {
      paintFlatSolids(context, flatPlaces(frame), solidLooks(frame, look));
      this.paint(context, frame, model, look, galaxies);
    });
    this.stage.show(this.stage.points);
  }

  /** Takes what the first picture would take besides, in a task of its own. */
  async warmUp(): Promise<void> {
    await nextTask();
    const { widthPx, heightPx, pixelRatio, container } = this.stage;
    const { fontFamily } = getComputedStyle(container);
    this.merged.warmUp(Math.round(widthPx * pixelRatio), Math.round(heightPx * pixelRatio), fontFamily);
  }

  private drawSolids(frame: ConeFrame, look: LayerLook): void {
    const { layers } = this.gl;
    if (!layers) return;
    const seen = viewRows(frame);
    const places = frame.lanes.map((lane, i) => ({
      field: lane.field,
      pixels: frame.laneMatrices[i]!,
      seen: compose(seen, lane.model),
    }));
    layers.solids.draw(this.stage, this.meshes, places, solidLooks(frame, look));
  }

  private paint(
    context: CanvasRenderingContext2D,
    frame: ConeFrame,
    model: ConeModel,
    look: LayerLook,
    galaxies: Galaxies,
  ): void {
    if (!look.scale || !model.ready) return;
    paintOverlay(new Pen(context, look.theme, this.stage.widthPx, this.stage.heightPx), {
      view: model.view,
      reading: model.reading,
      aligned: model.aligned,
      pixels: frame.pixels,
      unitsPerPixel: frame.shown.pose.unitsPerPixel,
      perspective: frame.shown.pose.perspective > 0,
      lanes: frame.lanes.map((lane, i) => ({
        ...lane,
        matrix: frame.laneMatrices[i]!,
        shape: frame.fields[lane.field]!,
      })),
      scale: look.scale,
      radius: (mpc) => radiusAt(frame.shown.table, mpc),
      farMpc: model.farMpc,
      shells: look.shells,
      shellColours: look.colours,
      caption: model.state().caption,
      marks: {
        hovered: look.hovered === null ? null : pixelOf(look.hovered, frame, galaxies),
        picked: look.picked.map((row) => pixelOf(row, frame, galaxies)),
        pairText: look.pairText,
      },
    });
  }
}

/** Display space to right, up and back, as three rows of four. */
const viewRows = (frame: ConeFrame): number[] => frame.shown.pose.axes.flatMap((axis) => [...axis, 0]);

function flatPlaces(frame: ConeFrame): FlatPlace[] {
  const seen = viewRows(frame);
  return frame.lanes.map((lane, i) => {
    const { rings, centre, flat, mesh } = frame.fields[lane.field]!;
    const curved = flat ? null : mesh;
    return { rings, centre, curved, pixels: frame.laneMatrices[i]!, seen: compose(seen, lane.model) };
  });
}

function solidLooks({ shown, fields }: ConeFrame, look: LayerLook): SolidLook[] {
  const { shells, selected, hovered } = look.shells;
  // Spheres in spheres: every line of sight crosses all of them.
  const wholeSky = fields.every((field) => field.rings.length === 0);
  return shells.map((shell, i) => {
    const strength = i === selected ? 2.2 : i === hovered ? 1.7 : selected === null ? 1 : 0.7;
    return {
      inner: radiusAt(shown.table, shell.comovingMinMpc),
      outer: radiusAt(shown.table, shell.comovingMaxMpc),
      colour: look.colours[i]!,
      alpha: GLASS[look.theme.mode] * strength * (wholeSky ? 0.3 : 1),
    };
  });
}
