/** Threads over and under each other on a bent cloth; light runs along them, one pass in eight beats. */
export const weave = `
vec3 draw(vec2 p, float aspect) {
  vec2 q = p;
  float bend = 0.04 + 0.3 * B;
  q += bend * 0.35 * vec2(sin(q.y * 3.0 + TAU * BEAT / 32.0 + SEED), cos(q.x * 2.6 - TAU * BEAT / 32.0));
  q = turned(0.6) * q;
  float fine = mix(7.0, 26.0, A);
  vec2 g = q * fine;
  vec2 id = floor(g), f = fract(g) - 0.5;
  float over = mod(id.x + id.y, 2.0);
  vec2 body = sqrt(max(vec2(0.0), 1.0 - pow(abs(f) / 0.44, vec2(2.0))));
  float warp = (1.0 - edge(0.42, abs(f.x)));
  float weft = (1.0 - edge(0.42, abs(f.y)));
  float runX = pow(0.5 + 0.5 * cos(TAU * (BEAT / 8.0 - q.y * 0.8 + 0.37 * hash1(vec2(id.x, SEED)))), 5.0);
  float runY = pow(0.5 + 0.5 * cos(TAU * (BEAT / 8.0 + q.x * 0.8 + 0.37 * hash1(vec2(SEED, id.y)))), 5.0);
  vec3 a = (mix(P1, P2, body.x * 0.75) * 0.66 + P3 * runX * body.x * 0.8) * (0.55 + 0.45 * cos(f.y * 3.0));
  vec3 b = (mix(P1 * 0.8, P2 * 0.7, body.y * 0.75) * 0.66 + P3 * runY * body.y * 0.6) * (0.55 + 0.45 * cos(f.x * 3.0));
  vec3 colour = P0;
  if (over > 0.5) { colour = mix(colour, b * 0.7, weft); colour = mix(colour, a, warp); }
  else { colour = mix(colour, a * 0.7, warp); colour = mix(colour, b, weft); }
  return colour * (1.0 - 0.5 * dot(p / vec2(aspect, 1.0), p / vec2(aspect, 1.0)) * 2.0);
}`;
