const SOFTWARE = /swiftshader|llvmpipe|softpipe|software|basic render/i;

/** Who draws for a context, and whether it is the processor standing in for a GPU. */
export function rendererOf(gl: WebGL2RenderingContext): { name: string; software: boolean } {
  const info = gl.getExtension('WEBGL_debug_renderer_info');
  const name = String(gl.getParameter(info ? info.UNMASKED_RENDERER_WEBGL : gl.RENDERER));
  return { name, software: SOFTWARE.test(name) };
}
