import {
  AddEquation,
  BufferAttribute,
  BufferGeometry,
  Camera,
  Color,
  CustomBlending,
  DoubleSide,
  GLSL3,
  Matrix4,
  Mesh,
  OneFactor,
  OneMinusSrcAlphaFactor,
  RawShaderMaterial,
  Scene,
  Vector2,
  type WebGLRenderer,
} from 'three';
import { clipMatrix, type Viewport } from '../geometry/projection.ts';
import type { ShellMesh } from '../geometry/shellMesh.ts';
import { RIM, type SolidLook } from '../solids/solidLook.ts';

const VERTEX = `
precision highp float;
in vec3 position;
in float end;
uniform mat4 clip;
uniform mat4 seen;
uniform vec2 radii;
out vec3 vSeen;
void main() {
  vec4 p = vec4(position * mix(radii.x, radii.y, end), 1.0);
  vSeen = (seen * p).xyz;
  gl_Position = clip * p;
}`;

// Glass: a wall seen face on is nearly clear, one that is turned away catches the light.
const FRAGMENT = `
precision highp float;
in vec3 vSeen;
uniform vec3 colour;
uniform float alpha;
uniform float rim;
out vec4 pixel;
void main() {
  vec3 normal = normalize(cross(dFdx(vSeen), dFdy(vSeen)));
  float turned = 1.0 - abs(normal.z);
  float a = alpha * (1.0 + rim * turned * turned);
  pixel = vec4(colour * a, a);
}`;

/** Where a field's solids stand in this frame. */
export interface SolidPlace {
  readonly field: number;
  /** Sky direction times radius to CSS pixels, three rows of four. */
  readonly pixels: Float64Array;
  /** The same to right, up and back in units of the display, for the shading. */
  readonly seen: Float64Array;
}

type Solid = Mesh<BufferGeometry, RawShaderMaterial>;

/** Translucent shells; one geometry for each field, shared by all its shells. */
export class ShellSolids {
  private readonly renderer: WebGLRenderer;
  private readonly scene = new Scene();
  private readonly camera = new Camera();
  private geometries: BufferGeometry[] = [];
  private solids: Solid[][] = [];
  private meshes: readonly ShellMesh[] = [];

  constructor(renderer: WebGLRenderer) {
    this.renderer = renderer;
  }

  /** Draws over what the canvas holds. @param meshes the solids' shapes, one for each field */
  draw(
    viewport: Viewport,
    meshes: readonly ShellMesh[],
    places: readonly SolidPlace[],
    looks: readonly SolidLook[],
  ): void {
    if (meshes !== this.meshes) this.setMeshes(meshes);
    this.place(viewport, places, looks);
    this.renderer.render(this.scene, this.camera);
  }

  private setMeshes(meshes: readonly ShellMesh[]): void {
    this.dispose();
    this.meshes = meshes;
    this.geometries = meshes.map((mesh) => {
      const geometry = new BufferGeometry();
      geometry.setAttribute('position', new BufferAttribute(mesh.directions, 3));
      geometry.setAttribute('end', new BufferAttribute(mesh.ends, 1));
      geometry.setIndex(new BufferAttribute(mesh.triangles, 1));
      return geometry;
    });
    this.solids = meshes.map(() => []);
  }

  private place(viewport: Viewport, places: readonly SolidPlace[], looks: readonly SolidLook[]): void {
    for (const solid of this.solids.flat()) solid.visible = false;
    for (const place of places) {
      const clip = new Matrix4().fromArray(clipMatrix(place.pixels, viewport));
      const s = place.seen;
      const seen = new Matrix4().set(
        s[0]!,
        s[1]!,
        s[2]!,
        s[3]!,
        s[4]!,
        s[5]!,
        s[6]!,
        s[7]!,
        s[8]!,
        s[9]!,
        s[10]!,
        s[11]!,
        0,
        0,
        0,
        1,
      );
      for (const [i, look] of looks.entries()) {
        const solid = this.solid(place.field, i);
        if (!solid || look.alpha <= 0) continue;
        solid.visible = true;
        const { uniforms } = solid.material;
        (uniforms.clip!.value as Matrix4).copy(clip);
        (uniforms.seen!.value as Matrix4).copy(seen);
        (uniforms.radii!.value as Vector2).set(look.inner, look.outer);
        const [r, g, b] = look.colour;
        (uniforms.colour!.value as Color).setRGB(r / 255, g / 255, b / 255);
        uniforms.alpha!.value = look.alpha;
      }
    }
  }

  dispose(): void {
    for (const solid of this.solids.flat()) {
      this.scene.remove(solid);
      solid.material.dispose();
    }
    for (const geometry of this.geometries) geometry.dispose();
    this.geometries = [];
    this.solids = [];
  }

  private solid(field: number, shell: number): Solid | null {
    const geometry = this.geometries[field];
    const row = this.solids[field];
    if (!geometry || !row) return null;
    const known = row[shell];
    if (known) return known;
    const material = new RawShaderMaterial({
      glslVersion: GLSL3,
      vertexShader: VERTEX,
      fragmentShader: FRAGMENT,
      uniforms: {
        clip: { value: new Matrix4() },
        seen: { value: new Matrix4() },
        radii: { value: new Vector2() },
        colour: { value: new Color() },
        alpha: { value: 0 },
        rim: { value: RIM },
      },
      side: DoubleSide,
      transparent: true,
      blending: CustomBlending,
      blendEquation: AddEquation,
      blendSrc: OneFactor,
      blendDst: OneMinusSrcAlphaFactor,
      depthTest: false,
      depthWrite: false,
    });
    const solid: Solid = new Mesh(geometry, material);
    solid.frustumCulled = false;
    row[shell] = solid;
    this.scene.add(solid);
    return solid;
  }
}
