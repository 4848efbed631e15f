import { Color } from 'three';
import type { Triple } from '../colour/oklab.ts';
import { type ConeFrame, pixelOf } from './coneFrame.ts';
import type { ConeModel, Shown } from './coneModel.ts';
import { compose } from './geometry/projection.ts';
import type { GlStage } from './glStage.ts';
import { paintOverlay } from './overlay/paintOverlay.ts';
import { Pen } from './overlay/pen.ts';
import type { Galaxies } from './points/galaxies.ts';
import { radiusAt } from './points/radiusTable.ts';
import { ShellSolids, type SolidLook } from './solids/shellSolids.ts';
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

/** Solids by three.js and lines, rulers and labels on a 2D canvas, above the points. */
export class ConeLayers {
  readonly solids = new ShellSolids();
  private readonly stage: Stage;
  private readonly gl: GlStage;

  constructor(stage: Stage, gl: GlStage) {
    this.stage = stage;
    this.gl = gl;
  }

  /** Clears the WebGL canvas: to the ground where it carries the points, else to nothing. */
  clear(ground: Triple | null): void {
    const { renderer } = this.gl;
    if (!renderer || !this.gl.usable) return;
    const { widthPx, heightPx, pixelRatio } = this.stage;
    const width = Math.max(1, Math.round(widthPx * pixelRatio));
    const height = Math.max(1, Math.round(heightPx * pixelRatio));
    if (renderer.domElement.width !== width || renderer.domElement.height !== height) {
      renderer.setPixelRatio(1);
      renderer.setSize(width, height, false);
    }
    const [r, g, b] = ground ?? [0, 0, 0];
    renderer.setClearColor(new Color(r / 255, g / 255, b / 255), ground ? 1 : 0);
    renderer.clear();
  }

  drawSolids(frame: ConeFrame, model: ConeModel, look: LayerLook): void {
    const { renderer } = this.gl;
    if (!renderer || !this.gl.usable) return;
    const seen = frame.shown.pose.axes.flatMap((axis) => [...axis, 0]);
    const places = frame.lanes.map((lane, i) => ({
      field: lane.field,
      pixels: frame.laneMatrices[i]!,
      seen: compose(seen, lane.model),
    }));
    this.solids.draw(renderer, this.stage, places, solidLooks(frame.shown, model, look));
  }

  drawOverlay(frame: ConeFrame, model: ConeModel, look: LayerLook, galaxies: Galaxies): void {
    const { overlay, pixelRatio, widthPx, heightPx } = this.stage;
    const context = overlay.getContext('2d');
    if (!context) return;
    this.stage.fit(overlay);
    context.setTransform(pixelRatio, 0, 0, pixelRatio, 0, 0);
    context.clearRect(0, 0, widthPx, heightPx);
    if (!look.scale) return;
    paintOverlay(new Pen(context, look.theme, widthPx, heightPx), {
      view: model.view,
      reading: model.reading,
      aligned: model.aligned,
      pixels: frame.pixels,
      unitsPerPixel: frame.shown.pose.unitsPerPixel,
      perspective: frame.shown.pose.perspective > 0,
      // Galaxies are splatted meanwhile: a region that changed since has asked for the next picture already.
      lanes: frame.lanes.flatMap((lane, i) => {
        const shape = model.fields[lane.field];
        return shape === undefined ? [] : [{ ...lane, matrix: frame.laneMatrices[i]!, shape }];
      }),
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

  dispose(): void {
    this.solids.dispose();
  }
}

function solidLooks(shown: Shown, model: ConeModel, look: LayerLook): SolidLook[] {
  const { shells, selected, hovered } = look.shells;
  // Spheres in spheres: every line of sight crosses all of them.
  const wholeSky = model.fields.every((field) => field.rings.length === 0);
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
