import type { Corners, PixelPoint } from './schema';

/** A 3×3 projective map, row by row, with the last entry 1. */
export type Homography = readonly [number, number, number, number, number, number, number, number, number];

/** Solves a square system by Gaussian elimination with partial pivoting. null when it is singular. */
const solve = (matrix: number[][], right: number[]): number[] | null => {
  const n = right.length;
  const rows = matrix.map((row, i) => [...row, right[i] ?? 0]);
  const at = (r: number, c: number): number => rows[r]?.[c] ?? 0;
  for (let col = 0; col < n; col += 1) {
    let pivot = col;
    for (let r = col + 1; r < n; r += 1) if (Math.abs(at(r, col)) > Math.abs(at(pivot, col))) pivot = r;
    if (Math.abs(at(pivot, col)) < 1e-12) return null;
    const [a, b] = [rows[col], rows[pivot]];
    if (!a || !b) return null;
    rows[col] = b;
    rows[pivot] = a;
    for (let r = 0; r < n; r += 1) {
      if (r === col) continue;
      const factor = at(r, col) / at(col, col);
      rows[r] = (rows[r] ?? []).map((value, c) => value - factor * at(col, c));
    }
  }
  return rows.map((row, i) => (row[n] ?? 0) / (row[i] ?? 1));
};

/**
 * The homography that takes four points onto four others: the direct linear transform for exactly four pairs
 * (Hartley & Zisserman, Multiple View Geometry, ch. 4, from memory). Throws a RangeError when three points of either
 * four lie on a line.
 */
export const homographyBetween = (from: readonly PixelPoint[], to: readonly PixelPoint[]): Homography => {
  const rows: number[][] = [];
  const right: number[] = [];
  for (const [i, [x, y]] of from.entries()) {
    const [u, v] = to[i] ?? [0, 0];
    rows.push([x, y, 1, 0, 0, 0, -x * u, -y * u], [0, 0, 0, x, y, 1, -x * v, -y * v]);
    right.push(u, v);
  }
  const h = solve(rows, right);
  if (h?.length !== 8) throw new RangeError('Four points with three on a line give no homography.');
  return [...h, 1] as unknown as Homography;
};

/** The unit square's corners in the order of a region's corners. */
export const unitSquare: Corners = [
  [0, 0],
  [1, 0],
  [1, 1],
  [0, 1],
];

/** The homography from the unit square (0,0 top left) onto a region's corners. */
export const homographyTo = (corners: Corners): Homography => homographyBetween(unitSquare, corners);

/** Where a point goes. */
export const applyHomography = (h: Homography, [x, y]: PixelPoint): PixelPoint => {
  const w = h[6] * x + h[7] * y + h[8];
  return [(h[0] * x + h[1] * y + h[2]) / w, (h[3] * x + h[4] * y + h[5]) / w];
};

/** The way back: the adjugate, scaled so that its last entry is 1 where it can be. */
export const invertHomography = ([a, b, c, d, e, f, g, h, i]: Homography): Homography => {
  const adjugate = [
    e * i - f * h,
    c * h - b * i,
    b * f - c * e,
    f * g - d * i,
    a * i - c * g,
    c * d - a * f,
    d * h - e * g,
    b * g - a * h,
    a * e - b * d,
  ];
  const last = adjugate[8] || 1;
  return adjugate.map((value) => value / last) as unknown as Homography;
};

/** Least turn at a corner that counts as convex: twice the area of a triangle, px². */
const leastTurn = 1e-6;

/** Whether four corners, in order, make a strictly convex quadrilateral of either handedness. */
export const isConvex = (corners: Corners): boolean => {
  const turns = corners.map(([x, y], i) => {
    const [nx, ny] = corners[(i + 1) % 4] ?? [0, 0];
    const [ox, oy] = corners[(i + 2) % 4] ?? [0, 0];
    return (nx - x) * (oy - ny) - (ny - y) * (ox - nx);
  });
  return turns.every((turn) => turn > leastTurn) || turns.every((turn) => turn < -leastTurn);
};
