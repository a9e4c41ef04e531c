/** Striped cloth that moves in a slow wind, with light on its folds. */
export const awning = `
vec3 draw(vec2 p, float aspect) {
  float wind = BEAT / 16.0;
  float fold = fbm(vec2(p.x * 1.3 + wind + SEED, p.y * 0.7 - wind * 0.4)) + 0.35 * noise(vec2(p.x * 4.0 - wind * 2.0, p.y * 1.5 + SEED));
  float depth = 0.08 + 0.5 * B;
  vec2 q = turned(0.42) * p + vec2(depth * 0.5 * (fold - 0.5), 0.0);
  float stripes = mix(11.0, 3.0, A);
  float s = q.x * stripes + BEAT / 8.0;
  float wave = abs(fract(s) - 0.5) * 2.0;
  float on = edge(0.5, wave);
  float thin = edge(0.47, wave) - edge(0.53, wave);
  float slope = fbm(vec2((p.x + 0.02) * 1.3 + wind + SEED, p.y * 0.7 - wind * 0.4)) - fbm(vec2((p.x - 0.02) * 1.3 + wind + SEED, p.y * 0.7 - wind * 0.4));
  float light = clamp(0.72 + slope * depth * 10.0, 0.1, 1.3);
  float weave = 0.96 + 0.04 * sin(q.x * 900.0) * sin(q.y * 900.0);
  vec3 cloth = mix(P1, P2, on) * light * weave;
  cloth = mix(cloth, P3 * light, clamp(thin, 0.0, 1.0) * 0.7);
  cloth += P3 * pow(clamp(slope * depth * 5.0, 0.0, 1.0), 2.0) * 0.5;
  return mix(P0, cloth, 0.35 + 0.65 * smoothstep(0.75, -0.1, length(p / vec2(aspect, 1.0))));
}`;
