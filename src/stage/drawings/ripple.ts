/** Rings from drops on dark water under a far lamp. A drop falls every other beat; its rings live for twelve. */
export const ripple = `
vec3 draw(vec2 p, float aspect) {
  float count = 2.0 + floor(A * 5.0);
  float pitch = mix(16.0, 44.0, B);
  // The water lies flat and goes away from the eye.
  float far = 0.62 / (0.78 - p.y);
  vec2 water = vec2(p.x * far, far) * 1.7;
  vec2 slope = vec2(0.0);
  float foam = 0.0;
  for (int i = 0; i < 7; i++) {
    if (float(i) >= count) break;
    float turn = (BEAT + float(i) * 12.0 / count) / 12.0;
    float age = fract(turn);
    vec2 r = hash3(vec2(floor(turn) + float(i) * 13.0, SEED)).xy;
    vec2 away = water - vec2((r.x - 0.5) * aspect * 1.5, mix(0.95, 2.3, r.y));
    float d = length(away) + 1e-4;
    float front = age * 2.2;
    float off = (d - front + 0.06) / (0.08 + 0.34 * age);
    float band = max(0.0, 1.0 - off * off * 0.3);
    if (band <= 0.0) continue;
    band *= band * (1.0 - age) * (1.0 - age) * min(1.0, age * 18.0);
    slope += away / d * sin((d - front) * pitch) * band;
    foam += band;
  }
  // The water is never quite still.
  vec2 drift = vec2(water.x * 1.6, water.y * 3.4) + vec2(SEED, -TIME * 0.06);
  float calm = noise(drift) - 0.5;
  float fine = noise(vec2(water.x * 5.0 + TIME * 0.1, water.y * 13.0 - TIME * 0.13)) - 0.5;
  slope += vec2(0.22 * calm + 0.1 * fine, 0.3 * calm + 0.26 * fine);
  float lit = slope.y * 0.8 + slope.x * 0.35;
  float bright = clamp(lit, 0.0, 1.0);
  float away_ = smoothstep(0.75, 2.4, far * 1.7);
  vec3 colour = mix(P0, P1 * 1.15, 0.15 + 0.75 * away_ + 0.3 * calm);
  colour *= 1.0 - 0.7 * clamp(-lit, 0.0, 1.0);
  colour += P2 * bright * (0.55 + 0.5 * away_);
  colour += P3 * bright * bright * (0.55 + 0.5 * bright);
  // The lamp's light stands on the water as a path that the rings break.
  float x = p.x - 0.16 * aspect + slope.x * 0.30 + slope.y * 0.04;
  float path = 0.0035 / (0.0035 + x * x);
  float broken = clamp(0.42 + slope.y * 1.9 + fine * 0.9, 0.0, 1.4);
  colour += mix(P2, P3, 0.35 + 0.5 * path) * path * broken * (0.25 + 0.6 * away_);
  colour += P2 * foam * 0.05;
  vec2 v = p / vec2(aspect, 1.0);
  return colour * (1.0 - 1.3 * dot(v, v));
}`;
