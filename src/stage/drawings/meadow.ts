/** Fireflies over a dusk meadow. B gathers their flashing until the whole field glows in step, one swell in four beats. */
export const meadow = `
vec3 flies(vec2 p, float scale, float layer) {
  vec2 g = p * scale + vec2(SEED + layer * 7.3, layer * 3.1);
  // The four cells whose middles are nearest: no fly of another cell is within three quarters of a cell.
  vec2 home = floor(g - 0.5);
  vec3 light = vec3(0.0);
  for (int n = 0; n < 4; n++) {
    vec2 id = home + vec2(n & 1, n >> 1);
    vec2 r = hash2(id + layer * 31.0);
    vec2 at = id + 0.5 + 0.25 * vec2(sin(TIME * (0.15 + 0.2 * r.x) + TAU * r.y), cos(TIME * (0.11 + 0.17 * r.y) + TAU * r.x));
    float d = length(g - at);
    float near = 1.0 - smoothstep(0.35, 0.75, d);
    float here = step(hash1(id + 5.5), 0.2 + 0.8 * A);
    float phase = BEAT / 4.0 + (1.0 - B) * r.x * 3.0 + 0.12 * r.y;
    float swell = 0.5 + 0.5 * cos(TAU * phase);
    float glow = 0.12 + 0.88 * swell * swell * swell;
    float size = mix(0.022, 0.055, r.y);
    float core = exp(-d * d / (size * size));
    float halo = exp(-d / (size * 3.5));
    light += (P3 * halo * 0.4 + mix(P3, vec3(1.0), 0.55) * core) * glow * near * here;
  }
  return light;
}
vec3 draw(vec2 p, float aspect) {
  float up = p.y + 0.5;
  vec3 colour = mix(P1, P0, smoothstep(0.0, 0.8, up));
  colour += P2 * 0.22 * exp(-5.0 * up) * (0.6 + 0.8 * fbm(vec2(p.x * 2.0 + TIME * 0.03, up * 5.0)));
  float ridge = 0.16 + 0.05 * noise(vec2(p.x * 1.7 + SEED, 2.0)) + 0.02 * noise(vec2(p.x * 7.0, SEED));
  colour = mix(P0 * 0.6 + P1 * 0.25, colour, edge(ridge, up));
  colour += 1.1 * flies(p, 3.4, 0.0) + 0.75 * flies(p, 5.6, 1.0) + 0.5 * flies(p, 9.0, 2.0);
  float blade = 0.0;
  for (int i = 0; i < 2; i++) {
    float k = 26.0 + 22.0 * float(i);
    float x = p.x * k + SEED + float(i) * 3.3;
    float cell = floor(x), f = fract(x) - 0.5;
    float tall = (0.05 + 0.11 * hash1(vec2(cell, float(i)))) * (1.0 - 0.25 * float(i));
    float bend = 0.5 * sin(TIME * 0.5 + cell) * up / tall * 0.4;
    blade = max(blade, 1.0 - edge(0.32 * (1.0 - up / tall), abs(f + bend)) * 1.0);
    blade *= step(up, tall) + (1.0 - step(up, tall)) * (i == 0 ? 0.0 : 1.0);
  }
  return mix(colour, P0 * 0.5, clamp(blade, 0.0, 1.0) * step(up, 0.17));
}`;
