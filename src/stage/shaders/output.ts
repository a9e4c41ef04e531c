import { shownFunction } from './quad';

/** From the scene that leaves to the one that lands. Slats turn away one after the other, left to right. */
export const transitionFragment = `#version 300 es
precision highp float;
in vec2 vUv;
out vec4 outColour;
uniform vec4 uTurn; // progress, slats (0: crossfade), width / height
uniform sampler2D uUnder;
uniform sampler2D uOver;
${shownFunction}
void main() {
  vec3 under = texture(uUnder, vUv).rgb;
  vec3 over = texture(uOver, vUv).rgb;
  float share = uTurn.x;
  float shade = 1.0;
  if (uTurn.y > 0.5) {
    float at = vUv.x * uTurn.y;
    float late = floor(at) / uTurn.y;
    float turn = clamp(uTurn.x * 1.6 - late * 0.6, 0.0, 1.0);
    turn = turn * turn * (3.0 - 2.0 * turn);
    float f = fract(at) - 0.5;
    float soft = 0.75 * fwidth(at);
    // A slat swings about its own middle: its face narrows and darkens, and the next scene stands behind it.
    float half_ = 0.5 * (1.0 - turn) * (1.0 + 4.0 * soft);
    float face = clamp(0.5 + (half_ - abs(f)) / max(soft, 1e-5), 0.0, 1.0) * step(turn, 0.9999);
    share = 1.0 - face;
    shade = 1.0 - 0.3 * turn * face;
  }
  outColour = shown(mix(under, over, share) * shade);
}
`;

/** A picture in a region of the output map. */
export const pictureFragment = `#version 300 es
precision highp float;
in vec2 vUv;
out vec4 outColour;
uniform sampler2D uPicture;
${shownFunction}
void main() { outColour = shown(texture(uPicture, vUv).rgb); }
`;

/** A picture with see-through parts (premultiplied) laid over everything. */
export const overFragment = `#version 300 es
precision highp float;
in vec2 vUv;
out vec4 outColour;
uniform sampler2D uPicture;
void main() { outColour = texture(uPicture, vUv); }
`;
