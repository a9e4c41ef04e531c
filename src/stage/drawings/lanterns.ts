/** Paper lanterns on long lines, near and far, that sway and glow. */
export const lanterns = `
vec3 draw(vec2 p, float aspect) {
  vec3 colour = mix(P1 * 0.55, P0, smoothstep(-0.6, 0.45, p.y));
  float pixel = fwidth(p.y);
  for (int layer = 0; layer < 3; layer++) {
    float far = float(2 - layer);
    float scale = 1.5 + 1.5 * far;
    float columns = scale * (0.6 + 0.9 * A);
    float start = SEED + far * 5.7;
    float x = p.x * columns + start;
    float home = floor(x);
    float dim = 1.0 - 0.26 * far;
    for (int n = -1; n <= 1; n++) {
      float id = home + float(n);
      vec3 r = hash3(vec2(id, far * 9.1 + 2.0));
      float drop = mix(0.34, -0.32, r.y);
      float down = (p.y - drop) * scale;
      // A while that breaks is really skipped, also by software renderers.
      while (down > -0.95) {
      vec2 at = vec2((id + 0.5 + 0.4 * (r.x - 0.5) - start) / columns, drop);
      float sway = (0.1 + 0.5 * B) * (swell(BEAT / 16.0 + r.x) - 0.5) * 0.5;
      at.x += sway * (0.5 - drop) * 0.5;
      vec2 q = vec2((p.x - at.x) * scale, down);
      q.x += q.y * sway * 0.7;
      float line = (1.0 - smoothstep(0.003, 0.003 + 1.5 * pixel * scale, abs(q.x))) * step(0.2, q.y);
      colour = mix(colour, P1 * 1.2, line * 0.55 * dim);
      vec2 e = q / vec2(0.17, 0.2);
      float body = length(e);
      while (body < 4.5) {
      float breath = 0.68 + 0.37 * swell(BEAT / 8.0 + r.z);
      // Cells meet inside one pixel's neighbours, so the width of an edge comes from p, not from body.
      float soft = pixel * scale / 0.17;
      float inside = 1.0 - smoothstep(1.0 - soft, 1.0 + soft, body);
      // Ribs lie closer where the paper turns away, and sag a little.
      float rib = swell((e.y * (1.0 + 0.22 * e.y * e.y) + 0.10 * e.x * e.x) * 5.5);
      float flame = max(0.0, 1.0 - dot(e - vec2(0.0, -0.25), e - vec2(0.0, -0.25)) * 0.62);
      vec3 paper = mix(P2, P3, flame * flame * 0.8) * (1.0 - 0.3 * rib * vec3(0.7, 1.0, 1.15)) * (1.2 - 0.5 * body * body);
      paper = mix(paper, P1 * 0.6, smoothstep(0.86, 0.9, abs(e.y)) * 0.85);
      colour = mix(colour, paper * breath * dim, inside);
      float out_ = max(body - 0.9, 0.0);
      float halo = max(0.0, 1.0 - out_ * 0.28);
      colour += P2 * (1.0 - inside) * breath * dim * (0.5 / (1.0 + 4.0 * out_ * out_)) * halo * halo;
      break; }
      break; }
    }
  }
  return colour;
}`;
