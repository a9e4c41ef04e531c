import type { OutputMap } from '#shared/mapping/schema';

/** What routes and jobs tell the hub. The hub fulfils it; server/index.ts hands it on. */
export interface HubCalls {
  /** Scenes, screens or files of a show have changed. */
  manifestChanged: (showId: string) => void;
  /** Files of a crew have changed: every room of that crew looks again. */
  assetsChanged: (crewId: string) => void;
  mapSaved: (showId: string, displayId: string, version: number, map: OutputMap, by: string | null) => void;
  /** A display joined, was renamed or forgotten. */
  displaysChanged: (showId: string) => void;
  modeChanged: (showId: string, mode: 'plan' | 'live' | 'closed') => void;
  /** Closes the sockets of whoever has lost the right to them. */
  revoke: (whom: { userId: string } | { displayId: string } | { sessionId: string }) => void;
}
