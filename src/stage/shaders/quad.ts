/**
 * The one vertex program: the unit square through a projective map into clip space, w kept, so that the card
 * interpolates with exact perspective (four vertices; see Heckbert 1989, from memory). vUv has v = 0 at the top.
 */
export const quadVertex = `#version 300 es
in vec2 aPosition;
out vec2 vUv;
uniform mat3 uMap;
void main() {
  vec3 q = uMap * vec3(aPosition, 1.0);
  vUv = aPosition;
  gl_Position = vec4(q.xy, 0.0, q.z);
}
`;
