import {
  BufferAttribute,
  BufferGeometry,
  PerspectiveCamera,
  Points,
  PointsMaterial,
  Scene,
  WebGLRenderer,
} from 'three';
import type { ConeView } from '../../../renderer/cone/coneView.ts';
import type { FrameStatistics } from '../../../renderer/cone/types.ts';
import { seeded } from './sample.ts';

const next = () => new Promise((resolve) => requestAnimationFrame(resolve));

/** The first frames are slower: code is compiled, memory is touched. */
const WARM_UP = 8;

export interface ConeSpeed {
  readonly frameSeconds: number;
  readonly drawnWhileMoving: number;
  /** From the request to the picture, in the middle and at worst. */
  readonly answerSeconds: number;
  readonly worstAnswerSeconds: number;
  /** From the last frame in motion until all galaxies stand. */
  readonly restSeconds: number;
  readonly pickSeconds: number;
  /** The same once the index for pointing has had time to be made. */
  readonly pickLaterSeconds: number;
  readonly layer: string;
}

/** Longer than the index for pointing at ten million galaxies takes. */
const INDEX_MS = 12_000;

/** Orbits for so many frames, as a hand that never stops does: a step with every beat of the screen. Rests, picks. */
export async function measureCone(
  cone: ConeView,
  log: readonly FrameStatistics[],
  nextFrame: () => Promise<void>,
  frames: number,
): Promise<ConeSpeed> {
  let turning = true;
  let steps = 0;
  const turn = async () => {
    while (turning) {
      cone.orbitBy(3, steps++ % 120 < 60 ? 1 : -1);
      await next();
    }
  };
  const turned = turn();
  for (let i = 0; i < WARM_UP; i++) await nextFrame();
  const start = performance.now();
  const from = log.length;
  for (let i = 0; i < frames; i++) await nextFrame();
  const frameSeconds = (performance.now() - start) / frames / 1000;
  turning = false;
  await turned;
  const moving = log.slice(from);
  const restStart = performance.now();
  while (!log.at(-1)!.atRest) await next();
  const restSeconds = (performance.now() - restStart) / 1000;
  const times = moving.map((f) => f.milliseconds).sort((a, b) => a - b);
  const pick = async (): Promise<number> => {
    const pickStart = performance.now();
    const picks = 10;
    for (let i = 0; i < picks; i++) await cone.galaxyAt(500 + 10 * i, 380);
    return (performance.now() - pickStart) / picks / 1000;
  };
  const pickSeconds = await pick();
  await new Promise((resume) => setTimeout(resume, INDEX_MS));
  return {
    frameSeconds,
    drawnWhileMoving: Math.round(moving.reduce((sum, f) => sum + f.drawn, 0) / moving.length),
    answerSeconds: times[times.length >> 1]! / 1000,
    worstAnswerSeconds: times.at(-1)! / 1000,
    restSeconds,
    pickSeconds,
    pickLaterSeconds: await pick(),
    layer: moving.at(-1)!.layer,
  };
}

/** Seconds a frame of a plain cloud of so many points, each frame waited for to the last pixel. */
export async function measurePlainPoints(
  count: number,
  width: number,
  height: number,
  frames: number,
): Promise<number> {
  const random = seeded(3);
  const positions = new Float32Array(3 * count).map(() => random() - 0.5);
  const geometry = new BufferGeometry();
  geometry.setAttribute('position', new BufferAttribute(positions, 3));
  const cloud = new Points(geometry, new PointsMaterial({ size: 1, sizeAttenuation: false }));
  const scene = new Scene();
  scene.add(cloud);
  const camera = new PerspectiveCamera(50, width / height, 0.1, 10);
  camera.position.z = 1.5;
  const renderer = new WebGLRenderer();
  renderer.setSize(width, height);
  const gl = renderer.getContext();
  const pixel = new Uint8Array(4);
  const draw = () => {
    cloud.rotation.y += 0.02;
    renderer.render(scene, camera);
    // Reading back waits until the picture is drawn.
    gl.readPixels(0, 0, 1, 1, gl.RGBA, gl.UNSIGNED_BYTE, pixel);
  };
  draw();
  const start = performance.now();
  for (let i = 0; i < frames; i++) {
    draw();
    await next();
  }
  const seconds = (performance.now() - start) / frames / 1000;
  geometry.dispose();
  cloud.material.dispose();
  renderer.dispose();
  renderer.forceContextLoss();
  return seconds;
}
