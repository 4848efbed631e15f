import { LIGHT_STEPS, VALUE_STEPS } from '../points/tone.ts';

/** A galaxy: light and light times value, to be summed. */
export const POINT_VERTEX = `
precision highp float;
in float px; in float py; in float pz; in float radius; in float value;
uniform mat4 clip;
uniform float size;
uniform float light;
uniform vec3 emphasis;
uniform vec4 depth;
uniform float least;
out vec2 vLight;
void main() {
  // A slot without a galaxy has no radius: put it outside the picture.
  if (!(radius >= 0.0)) { gl_Position = vec4(2.0, 2.0, 2.0, 1.0); gl_PointSize = 0.0; return; }
  gl_Position = clip * vec4(vec3(px, py, pz) * radius, 1.0);
  gl_PointSize = size;
  float weight = light * (radius >= emphasis.x && radius < emphasis.y ? 1.0 : emphasis.z);
  weight *= clamp(dot(depth, vec4(vec3(px, py, pz) * radius, 1.0)), least, 1.0);
  vLight = vec2(weight, weight * value);
}`;

export const POINT_FRAGMENT = `
precision highp float;
in vec2 vLight;
uniform float size;
out vec4 colour;
void main() {
  vec2 d = (gl_PointCoord - 0.5) * 2.0;
  float w = size <= 1.5 ? 1.0 : exp(-4.5 * dot(d, d));
  colour = vec4(vLight * w, 0.0, 0.0);
}`;

/** Sums of light to colours, by the table of tone.ts. */
export const TONE_VERTEX = `
precision highp float;
in vec3 position;
void main() { gl_Position = vec4(position.xy, 0.0, 1.0); }`;

export const TONE_FRAGMENT = `
precision highp float;
uniform highp sampler2D sums;
uniform highp sampler2D table;
out vec4 colour;
void main() {
  vec2 sum = texelFetch(sums, ivec2(gl_FragCoord.xy), 0).rg;
  int light = clamp(int(floatBitsToUint(max(sum.x, 0.0)) >> 18u) - ${(127 - 10) << 5}, 0, ${LIGHT_STEPS - 1});
  float mean = sum.x > 0.0 ? sum.y / sum.x : 0.0;
  int value = int(clamp(mean, 0.0, 1.0) * ${VALUE_STEPS - 1}.0 + 0.5);
  colour = texelFetch(table, ivec2(light, value), 0);
}`;
