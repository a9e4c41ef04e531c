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

function read(): z.infer<typeof keptSchema> | null {
  try {
    return keptSchema.safeParse(JSON.parse(localStorage.getItem(key) ?? 'null')).data ?? null;
  } catch {
    return null;
  }
}

/** What this display last knew, so that a reload while the hub is away goes on with the picture. */
export function recall(displayId: string): Known | null {
  const kept = read();
  return kept?.displayId === displayId ? kept : null;
}

/** Which display this browser last was. */
export function recallDisplay(): { displayId: string; showId: string } | null {
  const kept = read();
  return kept && { displayId: kept.displayId, showId: kept.state.showId };
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
