/**
 * Fireflies over a dusk meadow. B gathers their flashing until the whole field glows in step, one swell in four beats.
 * A `while` that breaks is really skipped, also by software renderers; an `if` is only masked there.
 */
export const meadow = `
vec3 flies(vec2 p, float scale, float layer, int cells) {
  vec2 g = p * scale + vec2(SEED + layer * 7.3, layer * 3.1);
  // Near flies shine into the next cells: the four nearest count. Far ones stay inside their own.
  vec2 home = floor(cells > 1 ? g - 0.5 : g);
  float roam = cells > 1 ? 0.5 : 0.44;
  float reach = cells > 1 ? 2.0 : 12.8;
  float light = 0.0;
  float white = 0.0;
  for (int n = 0; n < cells; n++) {
    vec2 id = home + vec2(n & 1, n >> 1);
    vec3 r = hash3(id + layer * 31.0);
    if (r.z > 0.25 + 0.75 * A) continue;
    vec2 drift = vec2(swell(TIME * (0.02 + 0.03 * r.x) + r.y), swell(TIME * (0.017 + 0.027 * r.y) + r.x)) - 0.5;
    vec2 off = g - (id + 0.5 + roam * drift);
    float d2 = dot(off, off);
    while (d2 * reach < 1.0) {
    float near = 1.0 - d2 * reach;
    float glow = swell(BEAT / 4.0 + (1.0 - B) * r.x * 3.0 + 0.12 * r.y);
    glow = 0.1 + 0.9 * glow * glow * glow;
    float size = mix(0.0009, 0.0052, r.y * r.y);
    light += near * near * glow * 0.75 * size / (size + d2) + near * near * near * near * glow * 0.2 * smoothstep(0.35, 1.0, r.y);
    float core = max(0.0, 1.0 - d2 / size);
    white += core * core * glow;
    break; }
  }
  return P3 * (light + white) + vec3(0.75) * white * white;
}
float grass(vec2 p, float fine, float up, float many, float tall, float row) {
  float cover = 0.0;
  float x = p.x * many + SEED + row * 3.7;
  float home = floor(x);
  float pixel = 1.2 * fine * many;
  for (int n = -1; n <= 1; n++) {
    vec3 r = hash3(vec2(home + float(n), row * 9.0));
    float t = up / (tall * (0.35 + 0.65 * r.x));
    float bend = ((r.y - 0.5) * 1.5 + 0.35 * (swell(TIME * 0.11 + r.z + p.x * 0.3) - 0.5)) * t * t;
    float body = 0.16 * (1.0 - t * t) - abs(x - home - float(n) - 0.2 - 0.6 * r.z - bend);
    cover = max(cover, t < 1.0 ? smoothstep(0.0, pixel, body) : 0.0);
  }
  return cover;
}
vec3 draw(vec2 p, float aspect) {
  float up = p.y + 0.5;
  float pixel = fwidth(p.y);
  vec3 colour = mix(P1, P0, smoothstep(0.12, 0.8, up));
  colour += P2 * 0.3 * exp2(-7.0 * up) * (0.7 + 0.6 * noise(vec2(p.x * 2.0 + TIME * 0.03, up * 6.0)));
  while (up < 0.33) {
    float far = 0.235 + 0.035 * noise(vec2(p.x * 2.3 + SEED, 4.0)) + 0.03 * noise(vec2(p.x * 16.0, SEED)) + 0.012 * noise(vec2(p.x * 61.0, SEED));
    float mist = smoothstep(0.30, 0.10, up);
    colour = mix(mix(P0 * 0.7, P1 * 0.9 + P2 * 0.12, mist), colour, smoothstep(-0.003, 0.003, up - far));
    float ridge = 0.12 + 0.05 * noise(vec2(p.x * 1.4 + SEED, 2.0));
    colour = mix(mix(P0 * 0.5, P1 * 0.45, smoothstep(0.0, 0.17, up)), colour, smoothstep(-0.0015, 0.0015, up - ridge));
    break;
  }
  colour += 0.6 * flies(p, 9.5, 2.0, 1) + 0.95 * flies(p, 5.6, 1.0, 1);
  while (up < 0.16) { colour = mix(colour, P0 * 0.7 + P1 * 0.16, grass(p, pixel, up, 34.0, 0.15, 0.0)); break; }
  colour += 1.15 * flies(p, 3.1, 0.0, 4);
  while (up < 0.19) { colour = mix(colour, P0 * 0.4, grass(p, pixel, up, 19.0, 0.18, 1.0)); break; }
  return colour;
}`;
