/** Paper lanterns on long lines, near and far, that sway and glow. */
export const lanterns = `
vec3 draw(vec2 p, float aspect) {
  vec3 colour = mix(P1 * 0.5, P0, smoothstep(-0.6, 0.5, p.y));
  float pixel = fwidth(p.y);
  for (int layer = 0; layer < 3; layer++) {
    float far = float(2 - layer);
    float scale = 1.6 + 1.5 * far;
    float columns = scale * (0.6 + 0.9 * A);
    float x = p.x * columns + SEED + far * 5.7;
    float home = floor(x);
    for (int n = -1; n <= 1; n++) {
      float id = home + float(n);
      vec2 r = hash2(vec2(id, far * 9.1 + 2.0));
      float sway = (0.05 + 0.22 * B) * sin(TAU * (BEAT / 16.0 + r.x)) * 0.35;
      float drop = mix(0.32, -0.3, r.y);
      vec2 at = vec2((id + 0.5 + 0.3 * (r.x - 0.5)) / columns - (SEED + far * 5.7) / columns, drop);
      at.x += sway * (0.5 - drop) * 0.4;
      vec2 q = (p - at) * scale;
      q = turned(sway * 0.8) * q;
      float body = length(q / vec2(0.17, 0.21));
      float ribs = 0.86 + 0.14 * cos(q.y * 150.0);
      float breath = 0.78 + 0.22 * cos(TAU * (BEAT / 8.0 + r.x));
      float dim = 1.0 - 0.28 * far;
      // Cells meet inside one pixel's neighbours, so the width of an edge comes from p, not from body.
      float soft = pixel * scale / 0.17;
      float inside = 1.0 - smoothstep(1.0 - soft, 1.0 + soft, body);
      vec3 paper = mix(P3, P2, smoothstep(0.0, 1.0, body)) * ribs * (1.05 - 0.45 * body * body);
      float line = (1.0 - smoothstep(0.004, 0.004 + 1.5 * pixel * scale, abs(q.x))) * step(0.2, q.y) * 0.5;
      colour = mix(colour, P1 * 1.1, line * dim);
      colour = mix(colour, paper * breath * dim, inside);
      colour += P2 * exp(-1.9 * max(body - 1.0, 0.0)) * (1.0 - inside) * 0.34 * breath * dim;
    }
  }
  return colour;
}`;
