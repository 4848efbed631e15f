import { rendererOf } from './rendererName.ts';

/** Whether a GPU stands behind WebGL. Making a context takes up to a second where none does: not on the page. */
function hasGpu(): boolean {
  const canvas = new OffscreenCanvas(1, 1);
  // Most browsers say no at once where the processor would stand in.
  const gl = canvas.getContext('webgl2', { failIfMajorPerformanceCaveat: true });
  if (!gl) return false;
  const { software } = rendererOf(gl);
  gl.getExtension('WEBGL_lose_context')?.loseContext();
  return !software;
}

postMessage(hasGpu());
