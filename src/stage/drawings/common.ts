import { shownFunction } from '../shaders/quad';

/** Head of every drawing: inputs, palette names and the little mathematics they share. */
export const drawingHead = `#version 300 es
precision highp float;
in vec2 vUv;
out vec4 outColour;
${shownFunction}
uniform vec4 uMoment; // beat, seconds, seed, aspect
uniform vec4 uDials;  // a, b, unused, unused
uniform vec4 uP0;
uniform vec4 uP1;
uniform vec4 uP2;
uniform vec4 uP3;
#define BEAT uMoment.x
#define TIME uMoment.y
#define SEED uMoment.z
#define A uDials.x
#define B uDials.y
#define P0 uP0.rgb
#define P1 uP1.rgb
#define P2 uP2.rgb
#define P3 uP3.rgb
const float TAU = 6.28318530718;
float hash1(vec2 p) {
  vec3 q = fract(vec3(p.xyx) * 0.1031);
  q += dot(q, q.yzx + 33.33);
  return fract((q.x + q.y) * q.z);
}
vec2 hash2(vec2 p) { return vec2(hash1(p), hash1(p + 17.17)); }
/* Three at the price of one. */
vec3 hash3(vec2 p) {
  vec3 q = fract(vec3(p.xyx) * vec3(0.1031, 0.1030, 0.0973));
  q += dot(q, q.yxz + 33.33);
  return fract((q.xxy + q.yzz) * q.zyx);
}
/* A swell without a cosine: 1 at whole numbers, 0 half way, soft at both. */
float swell(float x) { float w = abs(fract(x) - 0.5) * 2.0; return w * w * (3.0 - 2.0 * w); }
float noise(vec2 p) {
  vec2 i = floor(p), f = fract(p);
  f = f * f * (3.0 - 2.0 * f);
  return mix(mix(hash1(i), hash1(i + vec2(1, 0)), f.x), mix(hash1(i + vec2(0, 1)), hash1(i + vec2(1, 1)), f.x), f.y);
}
float fbm(vec2 p) {
  float sum = 0.0, size = 0.5;
  for (int i = 0; i < 4; i++) { sum += size * noise(p); p = mat2(1.6, 1.2, -1.2, 1.6) * p; size *= 0.5; }
  return sum;
}
mat2 turned(float angle) { float s = sin(angle), c = cos(angle); return mat2(c, -s, s, c); }
/* A step one pixel wide. */
float edge(float at, float x) { float w = fwidth(x) + 1e-5; return smoothstep(at - w, at + w, x); }
`;

/** Foot: p is centred, y up, height 1; a fine dither hides banding in dark rooms. */
export const drawingFoot = `
void main() {
  float aspect = uMoment.w;
  vec2 p = vec2((vUv.x - 0.5) * aspect, 0.5 - vUv.y);
  vec3 colour = draw(p, aspect);
  colour += (hash1(gl_FragCoord.xy) - 0.5) / 255.0;
  outColour = shown(clamp(colour, 0.0, 1.0));
}
`;
