import type { DrawingName } from '#shared/scene/schema';
import { awning } from './awning';
import { drawingFoot, drawingHead } from './common';
import { lanterns } from './lanterns';
import { meadow } from './meadow';
import { ripple } from './ripple';
import { searchlights } from './searchlights';
import { slats } from './slats';
import { tide } from './tide';
import { weave } from './weave';

const bodies: Record<DrawingName, string> = {
  meadow,
  searchlights,
  awning,
  ripple,
  slats,
  tide,
  lanterns,
  weave,
};

/** Fragment program of a drawing, GLSL ES 3.00. */
export const drawingFragment = (name: DrawingName): string => `${drawingHead}${bodies[name]}${drawingFoot}`;
