/** A slow swell under a low light. Nothing in it is quick: this is the calm look. */
export const tide = `
vec3 draw(vec2 p, float aspect) {
  float t = TIME * 0.06;
  vec3 colour = mix(P0, P1, smoothstep(0.5, -0.4, p.y));
  // A low moon behind haze, and the way it lays over the water.
  vec2 moon = p - vec2(0.18 * aspect, 0.36);
  float path = exp(-pow(moon.x / (0.06 + 0.35 * max(0.0, 0.3 - p.y)), 2.0));
  colour += mix(P2, P3, 0.6) * (0.28 * exp(-9.0 * length(moon)) + 0.5 * exp(-900.0 * dot(moon, moon)));
  float pixel = fwidth(p.y);
  vec3 sum = vec3(0.0);
  float left = 1.0;
  // Front to back, and no further than can be seen.
  for (int i = 5; i >= 0; i--) {
    float k = float(i);
    float far = k / 5.0;
    float base = 0.28 - 0.15 * k;
    float tall = (0.03 + 0.09 * A) * (0.4 + far);
    while (p.y < base + tall * 1.9) {
      float x = p.x * (2.2 - 1.2 * far) + SEED + k * 2.7;
      float crest = base + tall * (sin(x * 1.7 + t * (2.0 + k)) + 0.5 * sin(x * 3.1 - t * (1.4 + k)) + 0.6 * (noise(vec2(x * 1.4, t + k)) - 0.5));
      float under = smoothstep(-pixel, pixel, crest - p.y);
      float below = clamp((crest - p.y) / 0.3, 0.0, 1.0);
      vec3 water = mix(mix(P2, P3, 0.25 * B), P1 * 0.5, pow(below, 0.6)) * (0.35 + 0.65 * far);
      float rough = noise(vec2(x * 5.0 + t * 3.0, k));
      float glint = exp(-below * 26.0) * (0.25 + 0.75 * rough);
      water += P3 * glint * B * 0.8;
      water += P3 * path * (0.15 + 0.85 * rough) * exp(-below * 9.0) * B * 0.7;
      sum += left * under * water;
      left *= 1.0 - under;
      break;
    }
    if (left < 0.004) break;
  }
  return sum + left * colour;
}`;
