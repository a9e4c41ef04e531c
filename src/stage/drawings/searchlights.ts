/** Beams in haze that sweep from below the picture, one slow swing in sixteen beats. */
export const searchlights = `
vec3 draw(vec2 p, float aspect) {
  float haze = 0.55 + 0.75 * fbm(p * 2.5 + vec2(TIME * 0.05, -TIME * 0.03));
  vec3 colour = mix(P1 * 0.5, P0, smoothstep(-0.5, 0.5, p.y));
  int count = 3 + int(A * 6.0);
  for (int i = 0; i < 9; i++) {
    if (i >= count) break;
    float k = (float(i) + 0.5) / float(count);
    vec2 root = vec2((k - 0.5) * aspect * 0.8, -0.75);
    float r = hash1(vec2(float(i), SEED));
    float lean = (0.25 + 0.75 * B) * 0.8 * sin(TAU * (BEAT / 16.0 + k * 0.5 + 0.15 * r)) * (mod(float(i), 2.0) * 2.0 - 1.0);
    vec2 q = turned(-lean) * (p - root);
    float along = q.y;
    float width = 0.018 + 0.085 * along;
    float beam = exp(-pow(q.x / width, 2.0)) * smoothstep(0.0, 0.25, along);
    float fall = 1.0 / (0.6 + 1.3 * along * along);
    float swell = 0.7 + 0.3 * cos(TAU * (BEAT / 4.0 + k));
    colour += (P2 * beam * fall * haze + P3 * pow(beam, 6.0) * fall * 0.45) * swell * 0.8;
  }
  return colour;
}`;
