/** Beams in haze that sweep from below the picture, one slow swing in sixteen beats. */
export const searchlights = `
vec3 draw(vec2 p, float aspect) {
  vec2 drift = p * vec2(2.6, 3.4) + vec2(TIME * 0.06, -TIME * 0.04);
  float haze = 0.35 + 0.75 * noise(drift) + 0.4 * noise(drift * 2.7 + 3.1);
  vec3 colour = mix(P1 * 0.55, P0, smoothstep(-0.55, 0.4, p.y));
  int count = 3 + int(A * 6.0);
  float body = 0.0, core = 0.0;
  for (int i = 0; i < 9; i++) {
    if (i >= count) break;
    float k = (float(i) + 0.5) / float(count);
    float r = hash1(vec2(float(i), SEED));
    vec2 from = p - vec2((k - 0.5) * aspect * 0.86, -0.62);
    float side = (i & 1) == 0 ? 1.0 : -1.0;
    float lean = (0.2 + 0.8 * B) * 1.3 * (swell(BEAT / 16.0 + k * 0.5 + 0.15 * r) - 0.5) * side;
    vec2 way = vec2(lean, 1.0) * inversesqrt(1.0 + lean * lean);
    float along = dot(from, way);
    float off = abs(from.x * way.y - from.y * way.x);
    float width = 0.012 + 0.075 * along;
    float x = off / width;
    while (along > 0.0 && x < 4.0) {
    // A beam is a cone of even light with a soft rim, in a wide faint glow.
    float cone = 1.0 - smoothstep(0.35, 1.05, x);
    float inner = max(0.0, 1.0 - x * x * 2.5);
    float glow = max(0.0, 1.0 - x * 0.25);
    float fall = (0.75 + 0.25 * swell(BEAT / 4.0 + k)) / (0.35 + 1.9 * along);
    body += (cone + 0.16 * glow * glow * glow) * fall;
    core += inner * inner * fall * fall;
    break; }
  }
  colour += P2 * body * haze * 0.62 + P3 * core * (0.3 + 0.7 * haze) * 0.42;
  colour += mix(P2, P3, 0.5) * body * body * 0.05;
  return colour;
}`;
