import {
  BufferAttribute,
  BufferGeometry,
  Camera,
  CustomBlending,
  DataTexture,
  FloatType,
  GLSL3,
  HalfFloatType,
  Matrix4,
  Mesh,
  NearestFilter,
  NoBlending,
  OneFactor,
  Points,
  RawShaderMaterial,
  RGBAFormat,
  RGFormat,
  Scene,
  UnsignedByteType,
  Vector3,
  Vector4,
  type WebGLRenderer,
  WebGLRenderTarget,
} from 'three';
import { clipMatrix } from '../geometry/projection.ts';
import type { PointFrame, PointLayer, PointPart } from '../points/pointLayer.ts';
import type { PointStore } from '../points/pointStore.ts';
import { LIGHT_STEPS, type Tone, toneTable, VALUE_STEPS } from '../points/tone.ts';
import { POINT_FRAGMENT, POINT_VERTEX, TONE_FRAGMENT, TONE_VERTEX } from './pointShaders.ts';

/** Points by WebGL: light is summed in a float target and then toned by the same table as the software layer's. */
export class WebglPoints implements PointLayer {
  readonly kind = 'webgl';
  private readonly renderer: WebGLRenderer;
  private readonly camera = new Camera();
  private readonly pointScene = new Scene();
  private readonly toneScene = new Scene();
  private readonly target: WebGLRenderTarget;
  private readonly toneMaterial: RawShaderMaterial;
  private readonly toneTriangle: BufferGeometry;
  private table: DataTexture | null = null;
  private tone: Tone | null = null;
  private readonly words = new Uint32Array(VALUE_STEPS * LIGHT_STEPS);
  private clouds: Points<BufferGeometry, RawShaderMaterial>[] = [];
  private store: PointStore | null = null;

  /** @throws Error where the machine can draw into no float target */
  constructor(renderer: WebGLRenderer) {
    this.renderer = renderer;
    const { extensions } = renderer;
    const full = extensions.has('EXT_color_buffer_float') && extensions.has('EXT_float_blend');
    if (
      !full &&
      !extensions.has('EXT_color_buffer_float') &&
      !extensions.has('EXT_color_buffer_half_float')
    ) {
      throw new Error('no float render target');
    }
    this.target = new WebGLRenderTarget(1, 1, {
      format: RGFormat,
      type: full ? FloatType : HalfFloatType,
      magFilter: NearestFilter,
      minFilter: NearestFilter,
      depthBuffer: false,
    });
    this.toneMaterial = new RawShaderMaterial({
      glslVersion: GLSL3,
      vertexShader: TONE_VERTEX,
      fragmentShader: TONE_FRAGMENT,
      uniforms: { sums: { value: this.target.texture }, table: { value: null } },
      blending: NoBlending,
      depthTest: false,
      depthWrite: false,
    });
    this.toneTriangle = new BufferGeometry();
    this.toneTriangle.setAttribute(
      'position',
      new BufferAttribute(new Float32Array([-1, -1, 0, 3, -1, 0, -1, 3, 0]), 3),
    );
    const mesh = new Mesh(this.toneTriangle, this.toneMaterial);
    mesh.frustumCulled = false;
    this.toneScene.add(mesh);
  }

  setStore(store: PointStore | null): void {
    this.dropClouds();
    this.store = store;
    if (!store) return;
    const { arrays, ranges } = store;
    const attribute = (array: Float32Array | Uint8Array, normalized = false) =>
      new BufferAttribute(array, 1, normalized);
    const shared = {
      px: attribute(arrays.x),
      py: attribute(arrays.y),
      pz: attribute(arrays.z),
      radius: attribute(arrays.radius),
      value: attribute(arrays.value, true),
    };
    for (const _ of ranges) {
      const geometry = new BufferGeometry();
      for (const [name, value] of Object.entries(shared)) geometry.setAttribute(name, value);
      const material = new RawShaderMaterial({
        glslVersion: GLSL3,
        vertexShader: POINT_VERTEX,
        fragmentShader: POINT_FRAGMENT,
        uniforms: {
          clip: { value: new Matrix4() },
          size: { value: 1 },
          light: { value: 1 },
          emphasis: { value: new Vector3(0, 1e9, 1) },
          depth: { value: new Vector4(0, 0, 0, 1) },
          least: { value: 1 },
        },
        blending: CustomBlending,
        blendSrc: OneFactor,
        blendDst: OneFactor,
        transparent: true,
        depthTest: false,
        depthWrite: false,
      });
      const cloud = new Points(geometry, material);
      cloud.frustumCulled = false;
      this.clouds.push(cloud);
      this.pointScene.add(cloud);
    }
  }

  valuesChanged(): void {
    this.touch('value');
  }

  radiiChanged(): void {
    this.touch('radius');
  }

  /** Sums and tones the points onto the renderer's canvas, ground included. */
  draw(frame: PointFrame): void {
    const width = Math.max(1, Math.round(frame.viewport.widthPx * frame.pixelRatio));
    const height = Math.max(1, Math.round(frame.viewport.heightPx * frame.pixelRatio));
    if (this.target.width !== width || this.target.height !== height) this.target.setSize(width, height);
    this.updateTable(frame.tone);
    for (const cloud of this.clouds) cloud.visible = false;
    for (const part of frame.parts) this.updateCloud(part, frame);
    this.renderer.setRenderTarget(this.target);
    this.renderer.setClearColor(0x000000, 0);
    this.renderer.clear();
    this.renderer.render(this.pointScene, this.camera);
    this.renderer.setRenderTarget(null);
    this.renderer.render(this.toneScene, this.camera);
  }

  dispose(): void {
    this.dropClouds();
    this.target.dispose();
    this.toneMaterial.dispose();
    this.toneTriangle.dispose();
    this.table?.dispose();
  }

  private updateCloud(part: PointPart, frame: PointFrame): void {
    const nth = this.store?.ranges.indexOf(part.range) ?? -1;
    const cloud = this.clouds[nth];
    if (!cloud) return;
    const drawn = Math.ceil(part.range.count * frame.fraction);
    cloud.visible = drawn > 0;
    cloud.geometry.setDrawRange(part.range.start, drawn);
    const { uniforms } = cloud.material;
    (uniforms.clip!.value as Matrix4).fromArray(clipMatrix(part.matrix, frame.viewport));
    uniforms.size!.value = Math.max(1, frame.sizePx * frame.pixelRatio);
    uniforms.light!.value = drawn > 0 ? part.range.count / drawn : 0;
    (uniforms.depth!.value as Vector4).fromArray(part.depth?.row ?? [0, 0, 0, 1]);
    uniforms.least!.value = part.depth?.least ?? 1;
    const e = frame.emphasis;
    (uniforms.emphasis!.value as Vector3).set(e ? e.min : 0, e ? e.max : 1e9, e ? e.dim : 1);
  }

  private updateTable(tone: Tone): void {
    if (tone === this.tone && this.table) return;
    this.tone = tone;
    toneTable(tone, this.words);
    this.table ??= new DataTexture(
      new Uint8Array(this.words.buffer),
      LIGHT_STEPS,
      VALUE_STEPS,
      RGBAFormat,
      UnsignedByteType,
    );
    this.table.needsUpdate = true;
    this.toneMaterial.uniforms.table!.value = this.table;
  }

  private touch(name: string): void {
    // All clouds share one attribute.
    const attribute = this.clouds[0]?.geometry.getAttribute(name);
    if (attribute) attribute.needsUpdate = true;
  }

  private dropClouds(): void {
    for (const cloud of this.clouds) {
      this.pointScene.remove(cloud);
      cloud.geometry.dispose();
      cloud.material.dispose();
    }
    this.clouds = [];
  }
}
