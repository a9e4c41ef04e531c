/** Rings from drops in dark water. A drop falls every other beat; its rings live for twelve. */
export const ripple = `
float rings(vec2 p, float count, float sharp, float aspect) {
  float height = 0.0;
  for (int i = 0; i < 7; i++) {
    if (float(i) >= count) break;
    float turn = (BEAT + float(i) * 12.0 / count) / 12.0;
    float round = floor(turn), age = fract(turn);
    vec2 r = hash2(vec2(round + float(i) * 13.0, SEED));
    float d = length(p - (r - 0.5) * vec2(aspect, 1.0) * 0.9);
    float front = age * 1.3;
    float band = exp(-pow((d - front) / (0.05 + 0.22 * age), 2.0));
    height += sin((d - front) * mix(38.0, 90.0, sharp)) * band * (1.0 - age) * smoothstep(0.0, 0.05, age);
  }
  return height;
}
vec3 draw(vec2 p, float aspect) {
  float count = 2.0 + floor(A * 5.0);
  float h = rings(p, count, B, aspect);
  float dx = rings(p + vec2(0.004, 0.0), count, B, aspect) - h;
  float dy = rings(p + vec2(0.0, 0.004), count, B, aspect) - h;
  float swell = fbm(p * 2.0 + vec2(TIME * 0.04, TIME * 0.02) + SEED);
  vec3 colour = mix(P0, P1, 0.35 + 0.65 * swell);
  float lit = clamp(dx * 0.9 - dy * 0.7, -1.0, 1.0);
  colour += P2 * clamp(lit, 0.0, 1.0) * 1.1 + P3 * pow(clamp(lit, 0.0, 1.0), 4.0) * 1.3;
  colour *= 1.0 + 0.5 * clamp(-lit, -0.8, 0.0);
  return colour * (1.0 - 0.55 * dot(p, p));
}`;
