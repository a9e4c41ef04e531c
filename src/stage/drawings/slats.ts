/** A wall of slats before a lamp: they turn in a wave, one turn in eight beats, and let the light through. */
export const slats = `
vec3 draw(vec2 p, float aspect) {
  float count = floor(mix(5.0, 18.0, A));
  float y = (p.y + 0.5) * count;
  float row = floor(y), f = fract(y) - 0.5;
  float wave = sin(TAU * (BEAT / 8.0 + row / count + 0.35 * sin(p.x * 1.6 + SEED)));
  float turn = wave * (0.35 + 0.65 * B);
  float open = abs(turn);
  float half_ = 0.5 * sqrt(max(0.0, 1.0 - open * open * 0.97));
  float slat = 1.0 - edge(half_, abs(f));
  float lamp = exp(-1.7 * length((p - vec2(0.3 * sin(TAU * BEAT / 32.0), 0.05)) * vec2(1.0 / aspect * 1.5, 1.0)));
  float sheen = 0.35 + 0.65 * clamp(turn * (f / max(half_, 0.02)) * 0.5 + 0.5, 0.0, 1.0);
  vec3 behind = mix(P2, P3, lamp) * (0.3 + 1.5 * lamp);
  vec3 face = mix(P1, P2, sheen * 0.6) * (0.28 + 0.75 * lamp);
  face += P3 * smoothstep(0.75, 1.0, abs(f) / max(half_, 0.02)) * 0.25 * open;
  vec3 colour = mix(behind, face, slat);
  colour *= 0.93 + 0.07 * noise(vec2(p.x * 240.0, row * 9.0));
  return mix(P0, colour, 0.25 + 0.75 * smoothstep(0.95, 0.1, length(p / vec2(aspect, 1.0))));
}`;
