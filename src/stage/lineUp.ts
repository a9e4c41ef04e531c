/** Longest side of a grid's picture, pixels. */
const longest = 1280;
const ground = '#06120c';
const line = '#d3f84b';
const faint = 'rgba(211, 248, 75, 0.45)';
const cornerNames = ['1', '2', '3', '4'] as const;

const font = (px: number): string => `700 ${px}px "Atkinson Hyperlegible Next", sans-serif`;

/** Writes text as large as fits, up to `px`. */
const written = (
  context: CanvasRenderingContext2D,
  text: string,
  { x, y, px, room }: { x: number; y: number; px: number; room: number },
): void => {
  context.font = font(px);
  const width = context.measureText(text).width;
  if (width > room) context.font = font((px * room) / width);
  context.fillText(text, x, y);
};

/**
 * The line-up grid of a region: squares, diagonals, a circle that shows true proportions, the corners' numbers in the
 * order top left, top right, bottom right, bottom left, and the region's name.
 */
export const drawLineUp = (name: string, width: number, height: number): HTMLCanvasElement => {
  const canvas = document.createElement('canvas');
  const scale = Math.min(1, longest / Math.max(width, height));
  const w = Math.max(16, Math.round(width * scale));
  const h = Math.max(16, Math.round(height * scale));
  canvas.width = w;
  canvas.height = h;
  const context = canvas.getContext('2d');
  if (!context) return canvas;
  const small = Math.min(w, h);
  const stroke = Math.max(1, small / 320);
  context.fillStyle = ground;
  context.fillRect(0, 0, w, h);
  const path = (colour: string, width_: number, trace: () => void): void => {
    context.strokeStyle = colour;
    context.lineWidth = width_;
    context.beginPath();
    trace();
    context.stroke();
  };
  const across = Math.max(2, Math.round(w / (small / 6)));
  const down = Math.max(2, Math.round(h / (small / 6)));
  path(faint, stroke, () => {
    for (let i = 1; i < across; i += 1) {
      context.moveTo((i * w) / across, 0);
      context.lineTo((i * w) / across, h);
    }
    for (let i = 1; i < down; i += 1) {
      context.moveTo(0, (i * h) / down);
      context.lineTo(w, (i * h) / down);
    }
    context.moveTo(0, 0);
    context.lineTo(w, h);
    context.moveTo(w, 0);
    context.lineTo(0, h);
  });
  path(line, stroke * 2, () => context.arc(w / 2, h / 2, small * 0.38, 0, Math.PI * 2));
  path(line, stroke * 4, () => context.rect(0, 0, w, h));
  context.fillStyle = line;
  context.textBaseline = 'middle';
  const inset = small * 0.1;
  for (const [i, corner] of cornerNames.entries()) {
    context.textAlign = i === 0 || i === 3 ? 'left' : 'right';
    const x = i === 0 || i === 3 ? inset * 0.7 : w - inset * 0.7;
    written(context, corner, { x, y: i < 2 ? inset : h - inset, px: small * 0.14, room: w / 3 });
  }
  context.textAlign = 'center';
  written(context, name, { x: w / 2, y: h / 2, px: small * 0.16, room: small * 0.7 });
  return canvas;
};

/** A name over the whole canvas, on a dark plate, readable from across a room. */
export const drawLabel = (label: string, width: number, height: number): HTMLCanvasElement => {
  const canvas = document.createElement('canvas');
  const scale = Math.min(1, longest / Math.max(width, height));
  canvas.width = Math.max(16, Math.round(width * scale));
  canvas.height = Math.max(16, Math.round(height * scale));
  const context = canvas.getContext('2d');
  if (!context) return canvas;
  const { width: w, height: h } = canvas;
  context.fillStyle = 'rgba(4, 10, 8, 0.82)';
  context.fillRect(0, h * 0.3, w, h * 0.4);
  context.fillStyle = line;
  context.fillRect(0, h * 0.3, w, Math.max(2, h * 0.008));
  context.fillRect(0, h * 0.7, w, Math.max(2, h * 0.008));
  context.textAlign = 'center';
  context.textBaseline = 'middle';
  written(context, label, { x: w / 2, y: h * 0.51, px: h * 0.24, room: w * 0.9 });
  return canvas;
};
