/**
 * The one vertex program: the unit square through a projective map into clip space, w kept, so that the card
 * interpolates with exact perspective (four vertices; see Heckbert 1989, from memory). vUv is the place in the picture
 * with v = 0 at the top, vEdge the place in the quad.
 */
export const quadVertex = `#version 300 es
in vec2 aPosition;
out vec2 vUv;
out vec2 vEdge;
uniform mat3 uMap;
uniform vec4 uPart; // x, y, w, h of the picture
void main() {
  vec3 q = uMap * vec3(aPosition, 1.0);
  vUv = uPart.xy + aPosition * uPart.zw;
  vEdge = aPosition;
  gl_Position = vec4(q.xy, 0.0, q.z);
}
`;

/** How every picture leaves: dimmed, with an edge one pixel soft. */
export const shownFunction = `
in vec2 vEdge;
uniform vec4 uLight; // factor on code values
vec4 shown(vec3 colour) {
  vec2 inside = (0.5 - abs(vEdge - 0.5)) / (fwidth(vEdge) + 1e-9);
  return vec4(colour * uLight.x, 1.0) * clamp(0.5 + min(inside.x, inside.y), 0.0, 1.0);
}
`;
