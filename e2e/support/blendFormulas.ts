import type { BlendMode } from '#shared/scene/schema';

type Formula = (backdrop: number, source: number) => number;

const multiply: Formula = (b, s) => b * s;
const screen: Formula = (b, s) => b + s - b * s;
const hardLight: Formula = (b, s) => (s <= 0.5 ? multiply(b, 2 * s) : screen(b, 2 * s - 1));
const softLight: Formula = (b, s) => {
  if (s <= 0.5) return b - (1 - 2 * s) * b * (1 - b);
  const d = b <= 0.25 ? ((16 * b - 12) * b + 4) * b : Math.sqrt(b);
  return b + (2 * s - 1) * (d - b);
};

/** B(cb, cs) as written in W3C Compositing and Blending Level 1, §9.1 (separable blend modes), shares 0..1. */
export const blendFormulas: Record<Exclude<BlendMode, 'add'>, Formula> = {
  normal: (_b, s) => s,
  multiply,
  screen,
  overlay: (b, s) => hardLight(s, b),
  darken: Math.min,
  lighten: Math.max,
  'color-dodge': (b, s) => (b === 0 ? 0 : s === 1 ? 1 : Math.min(1, b / (1 - s))),
  'color-burn': (b, s) => (b === 1 ? 1 : s === 0 ? 0 : 1 - Math.min(1, (1 - b) / s)),
  'hard-light': hardLight,
  'soft-light': softLight,
  difference: (b, s) => Math.abs(b - s),
  exclusion: (b, s) => b + s - 2 * b * s,
};

/**
 * A source of some alpha over an opaque backdrop: co = (1 − as)·cb + as·B(cb, cs) (§9.1.4, αb = 1); `add` is
 * plus-lighter, min(1, as·cs + cb) (§9.1.4 of Level 2 draft, and CSS `plus-lighter`).
 */
export const blended = (mode: BlendMode, backdrop: number, source: number, alpha: number): number =>
  mode === 'add'
    ? Math.min(1, alpha * source + backdrop)
    : (1 - alpha) * backdrop + alpha * blendFormulas[mode](backdrop, source);
