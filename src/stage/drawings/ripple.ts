/** Rings from drops in dark water. A drop falls every other beat; its rings live for twelve. */
export const ripple = `
vec3 draw(vec2 p, float aspect) {
  float count = 2.0 + floor(A * 5.0);
  float pitch = mix(34.0, 80.0, B);
  vec2 slope = vec2(0.0);
  float foam = 0.0;
  for (int i = 0; i < 7; i++) {
    if (float(i) >= count) break;
    float turn = (BEAT + float(i) * 12.0 / count) / 12.0;
    float age = fract(turn);
    vec2 r = hash2(vec2(floor(turn) + float(i) * 13.0, SEED));
    vec2 away = p - (r - 0.5) * vec2(aspect, 1.0) * 0.9;
    float d = length(away) + 1e-4;
    float front = age * 1.5;
    float off = (d - front) / (0.05 + 0.24 * age);
    float band = exp(-off * off) * (1.0 - age) * (1.0 - age) * smoothstep(0.0, 0.06, age);
    slope += away / d * cos((d - front) * pitch) * band;
    foam += band;
  }
  // The water is never quite still.
  vec2 drift = p * 3.2 + vec2(TIME * 0.05, TIME * 0.03) + SEED;
  float here = fbm(drift);
  slope += 0.34 * vec2(noise(drift * 2.3) - 0.5, noise(drift * 2.3 + 9.7) - 0.5);
  float lit = dot(slope, normalize(vec2(0.6, 0.8)));
  float bright = clamp(lit, 0.0, 1.0);
  vec3 colour = mix(P0, P1, 0.25 + 0.9 * here) * (1.0 - 0.6 * clamp(-lit, 0.0, 1.0));
  colour += P2 * bright * (0.85 + 0.9 * here);
  colour += P3 * bright * bright * bright * 0.9;
  colour += P2 * foam * 0.07;
  // A low lamp at the far bank.
  vec2 lamp = p - vec2(0.22 * aspect, 0.62);
  colour += mix(P2, P3, 0.4) * 0.3 * exp(-1.8 * dot(lamp, lamp)) * (0.55 + 1.4 * bright);
  return colour * (1.0 - 0.4 * dot(p, p));
}`;
