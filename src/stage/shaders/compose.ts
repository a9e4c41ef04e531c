import { type BlendMode, blendModes } from '#shared/scene/schema';

/** Layers that one compose pass takes. */
export const slots = 4;

/** Number of a mode in the compose shader. */
export const modeNumber = (mode: BlendMode): number => blendModes.indexOf(mode);

const on = (mode: BlendMode): string => `mode == ${modeNumber(mode)}`;

const slot = (i: number): string => `
  if (count > ${i}) {
    vec2 at = vec2(dot(uAcross[${i}].xyz, here), dot(uDown[${i}].xyz, here));
    vec2 edge = clamp(0.5 + (0.5 - abs(at - 0.5)) * uSize[${i}].xy, 0.0, 1.0);
    colour = laid(colour, texture(uLayer${i}, at), uAcross[${i}].w * edge.x * edge.y, int(uDown[${i}].w + 0.5));
  }`;

/**
 * Up to four layers over a ground or over what is drawn already. Formulas: W3C Compositing and Blending Level 1,
 * section 9 (separable blend modes), on colours that are not premultiplied; the backdrop is always opaque, so
 * co = (1 − as)·cb + as·B(cb, cs). `add` is that text's plus-lighter.
 */
export const composeFragment = `#version 300 es
precision highp float;
in vec2 vUv;
out vec4 outColour;
uniform vec4 uGround; // rgb, and 1 to start from uBase instead
uniform vec4 uCount;
uniform vec4 uAcross[${slots}]; // row of the map from screen to layer; w: opacity
uniform vec4 uDown[${slots}]; // w: mode
uniform vec4 uSize[${slots}]; // pixels of the layer, for a soft edge one pixel wide
uniform sampler2D uBase;
uniform sampler2D uLayer0;
uniform sampler2D uLayer1;
uniform sampler2D uLayer2;
uniform sampler2D uLayer3;
vec3 soft(vec3 b, vec3 s) {
  vec3 d = mix(sqrt(b), ((16.0 * b - 12.0) * b + 4.0) * b, step(b, vec3(0.25)));
  return mix(b + (2.0 * s - 1.0) * (d - b), b - (1.0 - 2.0 * s) * b * (1.0 - b), step(s, vec3(0.5)));
}
float dodge(float b, float s) { return b <= 0.0 ? 0.0 : s >= 1.0 ? 1.0 : min(1.0, b / (1.0 - s)); }
float burn(float b, float s) { return b >= 1.0 ? 1.0 : s <= 0.0 ? 0.0 : 1.0 - min(1.0, (1.0 - b) / s); }
vec3 hard(vec3 b, vec3 s) {
  return mix(1.0 - (1.0 - b) * (2.0 - 2.0 * s), 2.0 * b * s, step(s, vec3(0.5)));
}
vec3 laid(vec3 b, vec4 drawn, float opacity, int mode) {
  vec3 s = drawn.a > 0.0 ? min(drawn.rgb / drawn.a, 1.0) : vec3(0.0);
  float a = drawn.a * opacity;
  if (${on('normal')}) return mix(b, s, a);
  if (${on('add')}) return min(b + s * a, 1.0);
  vec3 r = s;
  if (${on('multiply')}) r = b * s;
  else if (${on('screen')}) r = b + s - b * s;
  else if (${on('overlay')}) r = hard(s, b);
  else if (${on('darken')}) r = min(b, s);
  else if (${on('lighten')}) r = max(b, s);
  else if (${on('color-dodge')}) r = vec3(dodge(b.r, s.r), dodge(b.g, s.g), dodge(b.b, s.b));
  else if (${on('color-burn')}) r = vec3(burn(b.r, s.r), burn(b.g, s.g), burn(b.b, s.b));
  else if (${on('hard-light')}) r = hard(b, s);
  else if (${on('soft-light')}) r = soft(b, s);
  else if (${on('difference')}) r = abs(b - s);
  else if (${on('exclusion')}) r = b + s - 2.0 * b * s;
  return mix(b, r, a);
}
void main() {
  vec3 here = vec3(vUv, 1.0);
  int count = int(uCount.x + 0.5);
  vec3 colour = uGround.a > 0.5 ? texture(uBase, vUv).rgb : uGround.rgb;
${Array.from({ length: slots }, (_, i) => slot(i)).join('\n')}
  outColour = vec4(colour, 1.0);
}
`;
