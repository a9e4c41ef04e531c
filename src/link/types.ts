import type { OutputMap } from '#shared/mapping/schema';
import type {
  DisplayStatus,
  Drawn,
  Manifest,
  OnWall,
  Picture,
  RefusalCode,
  Vitals,
} from '#shared/protocol/messages';
import type { CommandBody } from '#shared/show/commands';
import type { Principal } from '#shared/show/roles';
import type { RoomKind, ShowState } from '#shared/show/state';

export interface LinkOptions {
  showId: string;
  room: RoomKind;
  /** `display` uses the device cookie, `crew` the session cookie. */
  as: 'crew' | 'display';
}

/** How the link is: `on` only after a welcome or a resume. */
export type LinkStatus = 'joining' | 'on' | 'away' | 'refused' | 'outdated';

/** All that a page knows, replaced as a whole at each change (for useSyncExternalStore). */
export interface LinkSnapshot {
  status: LinkStatus;
  /** Page's monotonic ms since which the link is away; null while on. */
  awaySince: number | null;
  /** Why the hub refused the socket, in a sentence. */
  refusedWhy: string | null;
  principal: Principal | null;
  displayId: string | null;
  state: ShowState | null;
  manifest: Manifest | null;
  maps: Readonly<Record<string, OutputMap>>;
  displayNames: Readonly<Record<string, string>>;
  displays: readonly DisplayStatus[];
  wall: readonly OnWall[];
  /** Newest true picture by `${displayId}/${screenId}`. */
  pictures: Readonly<Record<string, Picture>>;
  mode: 'plan' | 'live' | 'closed' | null;
  durable: 'database' | 'spill' | 'none';
  linkMs: number | null;
  clockErrorMs: number | null;
}

export type CommandResult =
  | { outcome: 'taken'; revision: number | null; landsAt: number | null }
  | { outcome: 'refused'; code: RefusalCode; words: string }
  /** No answer before it expired, or no link: it was not fired and never will be. */
  | { outcome: 'not-sent'; words: string };

export interface ShowLink {
  getSnapshot(): LinkSnapshot;
  subscribe(listener: () => void): () => void;
  /** Hub time now in ms, from the filtered clock; runs backwards only when the hub's own clock was set back by a second or more. */
  hubNow(): number;
  /** Hub time of a `performance.now()` value, such as a frame's. */
  hubTimeOf(performanceMs: number): number;
  /** Sends once; resolves with the hub's answer, or with `not-sent` when it expires. Never fires late. */
  send(body: CommandBody, options?: { expiryMs?: number }): Promise<CommandResult>;
  reportVitals(vitals: Vitals): void;
  /** Kept on board while the link is away and sent afterwards, without hole or double. */
  reportDrawn(drawn: Omit<Drawn, 'seq'>): void;
  reportPicture(picture: Picture): void;
  /** Maps while they are dragged; the listener is called at once. */
  onDraft(listener: (displayId: string, map: OutputMap) => void): () => void;
  onReload(listener: (displayId: string) => void): () => void;
  close(): void;
}
