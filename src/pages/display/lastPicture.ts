import { z } from 'zod';
import { type OutputMap, outputMapSchema } from '#shared/mapping/schema';
import { type Manifest, manifestSchema } from '#shared/protocol/messages';
import { type ShowState, showStateSchema } from '#shared/show/state';

/** What a display needs to draw without a hub. */
export interface Known {
  state: ShowState;
  manifest: Manifest;
  map: OutputMap;
  name: string;
}

const key = 'lampyrid.last';
const keptSchema = z.object({
  displayId: z.string(),
  state: showStateSchema,
  manifest: manifestSchema,
  map: outputMapSchema,
  name: z.string(),
});

/** What this display last knew, so that a reload while the hub is away goes on with the picture. */
export function recall(displayId: string): Known | null {
  try {
    const kept = keptSchema.safeParse(JSON.parse(localStorage.getItem(key) ?? 'null'));
    return kept.success && kept.data.displayId === displayId ? kept.data : null;
  } catch {
    return null;
  }
}

/** Which display this browser last was. */
export function recallDisplay(): { displayId: string; showId: string } | null {
  try {
    const kept = keptSchema.safeParse(JSON.parse(localStorage.getItem(key) ?? 'null'));
    return kept.success ? { displayId: kept.data.displayId, showId: kept.data.state.showId } : null;
  } catch {
    return null;
  }
}

export function remember(displayId: string, known: Known): void {
  try {
    localStorage.setItem(key, JSON.stringify({ displayId, ...known }));
  } catch {
    // Full or forbidden: the picture then needs the hub after a reload.
  }
}

export function forget(): void {
  try {
    localStorage.removeItem(key);
  } catch {
    // Nothing was kept.
  }
}
