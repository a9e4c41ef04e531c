/** Striped cloth that moves in a slow wind, with light on its folds. */
export const awning = `
vec3 draw(vec2 p, float aspect) {
  float wind = BEAT / 16.0;
  float depth = 0.25 + 0.9 * B;
  // Long folds and short ones across them; their slope is known, so light needs no second look.
  vec2 slope = vec2(0.0);
  float high = 0.0;
  for (int i = 0; i < 4; i++) {
    float k = float(i);
    vec2 way = i == 0 ? vec2(0.94, 0.34) : i == 1 ? vec2(0.99, -0.12) : i == 2 ? vec2(0.72, 0.69) : vec2(0.9, -0.44);
    float often = 3.1 + 2.3 * k + 1.9 * k * k * 0.4;
    float tall = 0.16 / (1.0 + 0.75 * k);
    float bow = 0.6 * sin(p.y * (1.7 + 0.6 * k) + k * 2.0 + TAU * wind * 0.5);
    float at = dot(p, way) * often + bow - TAU * wind * (1.0 + 0.5 * k) + SEED + k * 1.9;
    float s = sin(at), c = cos(at);
    high += tall * s;
    slope += way * (tall * often * c);
  }
  vec2 q = turned(0.36) * (p + 0.06 * depth * slope) + vec2(0.12 * depth * high, 0.0);
  float s = q.x * mix(9.0, 2.6, A) + BEAT / 8.0;
  float wave = abs(fract(s) - 0.5) * 2.0;
  float soft = fwidth(s) * 2.0 + 1e-4;
  float on = smoothstep(-soft, soft, wave - 0.5);
  float thread = smoothstep(soft, 0.0, abs(wave - 0.42) - 0.025);
  vec3 n = normalize(vec3(-slope * depth * 0.55, 1.0));
  float lit = clamp(dot(n, normalize(vec3(-0.62, 0.42, 0.55))), 0.0, 1.0);
  float sheen = clamp(dot(n, normalize(vec3(-0.36, 0.25, 0.9))), 0.0, 1.0);
  sheen *= sheen; sheen *= sheen; sheen *= sheen; sheen *= sheen; sheen *= sheen;
  float shade = lit * lit * (1.05 + 0.35 * lit);
  vec3 cloth = mix(P1 * 0.75, P2, on);
  cloth = mix(cloth, P3, thread * 0.75);
  vec3 colour = mix(P0 * 0.35, cloth, 0.03 + shade) + mix(P2, P3, 0.6) * sheen * (0.10 + 0.14 * on);
  float far = dot(p / vec2(aspect, 1.0), p / vec2(aspect, 1.0));
  return colour * (1.0 - 1.5 * far);
}`;
