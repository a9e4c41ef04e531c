import type { BlendMode } from '#shared/scene/schema';
import { shownFunction } from './quad';

/** Layers that one compose pass takes. */
export const slots = 4;

const hard = `
vec3 hard(vec3 b, vec3 s) {
  return mix(1.0 - (1.0 - b) * (2.0 - 2.0 * s), 2.0 * b * s, step(s, vec3(0.5)));
}`;
const soft = `
vec3 soft(vec3 b, vec3 s) {
  vec3 d = mix(sqrt(b), ((16.0 * b - 12.0) * b + 4.0) * b, step(b, vec3(0.25)));
  return mix(b + (2.0 * s - 1.0) * (d - b), b - (1.0 - 2.0 * s) * b * (1.0 - b), step(s, vec3(0.5)));
}`;
const dodge = `
float dodge(float b, float s) { return b <= 0.0 ? 0.0 : s >= 1.0 ? 1.0 : min(1.0, b / (1.0 - s)); }`;
const burn = `
float burn(float b, float s) { return b >= 1.0 ? 1.0 : s <= 0.0 ? 0.0 : 1.0 - min(1.0, (1.0 - b) / s); }`;

/**
 * B(b, s) of each mode: W3C Compositing and Blending Level 1, section 9.1 (separable blend modes). `add` is that
 * text's plus-lighter and has no B.
 */
const formulas: Record<Exclude<BlendMode, 'normal' | 'add'>, { body: string; needs?: string }> = {
  multiply: { body: 'b * s' },
  screen: { body: 'b + s - b * s' },
  overlay: { body: 'hard(s, b)', needs: hard },
  darken: { body: 'min(b, s)' },
  lighten: { body: 'max(b, s)' },
  'color-dodge': { body: 'vec3(dodge(b.r, s.r), dodge(b.g, s.g), dodge(b.b, s.b))', needs: dodge },
  'color-burn': { body: 'vec3(burn(b.r, s.r), burn(b.g, s.g), burn(b.b, s.b))', needs: burn },
  'hard-light': { body: 'hard(b, s)', needs: hard },
  'soft-light': { body: 'soft(b, s)', needs: soft },
  difference: { body: 'abs(b - s)' },
  exclusion: { body: 'b + s - 2.0 * b * s' },
};

/** One layer over what lies below; drawn is premultiplied, the formulas want colours that are not. */
const laid = (mode: BlendMode): string => {
  if (mode === 'normal') return 'b = b * (1.0 - drawn.a * a) + drawn.rgb * a;';
  if (mode === 'add') return 'b = min(b + drawn.rgb * a, 1.0);';
  return `vec3 s = min(drawn.rgb / max(drawn.a, 1e-4), 1.0);
    b = mix(b, ${formulas[mode].body}, drawn.a * a);`;
};

/** One layer of a compose program. `edged`: some of the screen lies outside it. */
export interface ComposeSlot {
  mode: BlendMode;
  edged: boolean;
}

const slot = ({ mode, edged }: ComposeSlot, i: number): string => `
  {
    vec2 at = vec2(dot(uAcross[${i}].xyz, here), dot(uDown[${i}].xyz, here));
    float a = uAcross[${i}].w;
    ${edged ? `vec2 edge = clamp(0.5 + (0.5 - abs(at - 0.5)) * uSize[${i}].xy, 0.0, 1.0); a *= edge.x * edge.y;` : ''}
    vec4 drawn = texture(uLayer${i}, at);
    ${laid(mode)}
  }`;

/**
 * Layers with these modes, back to front, over a ground or over what is drawn already. The backdrop is always opaque,
 * so co = (1 − as)·cb + as·B(cb, cs). A program holds only the formulas it needs: cards without skips run them all.
 */
export const composeFragment = (layers: readonly ComposeSlot[], onBase: boolean): string => {
  const needs = new Set(
    layers.flatMap(({ mode }) => (mode === 'normal' || mode === 'add' ? [] : (formulas[mode].needs ?? []))),
  );
  return `#version 300 es
precision highp float;
in vec2 vUv;
out vec4 outColour;
uniform vec4 uGround;
uniform vec4 uAcross[${slots}]; // row of the map from screen to layer; w: opacity
uniform vec4 uDown[${slots}];
uniform vec4 uSize[${slots}]; // pixels of the layer, for a soft edge one pixel wide
uniform sampler2D uBase;
${layers.map((_, i) => `uniform sampler2D uLayer${i};`).join('\n')}
${shownFunction}${[...needs].join('')}
void main() {
  vec3 here = vec3(vUv, 1.0);
  vec3 b = ${onBase ? 'texture(uBase, vUv).rgb' : 'uGround.rgb'};
${layers.map(slot).join('\n')}
  outColour = shown(b);
}
`;
};
