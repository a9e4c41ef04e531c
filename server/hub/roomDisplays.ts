import type { DrawnRow } from '#server/services/hubStore';
import type { DisplayStatus, Drawn, OnWall, Picture, Vitals } from '#shared/protocol/messages';
import { leadLimits } from '#shared/show/landing';
import type { RoomKind } from '#shared/show/state';
import { hubLimits } from './limits';

interface Known {
  status: DisplayStatus;
  /** Last round trips, ms. */
  links: number[];
}

const keptLinks = 20;

/** What displays say of themselves in one room: vitals, what they drew, small pictures. */
export class RoomDisplays {
  private readonly known = new Map<string, Known>();
  private readonly walls = new Map<string, OnWall>();
  private readonly pictures = new Map<string, Picture>();
  private readonly pictureAt = new Map<string, number>();

  /** Starts with the joined displays of a show, none of them here yet, and what was last drawn. */
  constructor(displayIds: readonly string[], wall: readonly OnWall[]) {
    this.setJoined(displayIds);
    for (const one of wall) this.walls.set(`${one.displayId}/${one.screenId}`, one);
  }

  /** Takes over which displays are joined; simulated ones stay while they are here. */
  setJoined(displayIds: readonly string[]): void {
    const joined = new Set(displayIds);
    for (const [id, { status }] of this.known)
      if (!joined.has(id) && !status.simulated) this.known.delete(id);
    for (const key of this.walls.keys()) {
      const [id = ''] = key.split('/');
      if (!joined.has(id) && !this.known.has(id)) this.walls.delete(key);
    }
    for (const id of joined) this.knownOf(id, false);
  }

  private knownOf(displayId: string, simulated: boolean): Known {
    const found = this.known.get(displayId);
    if (found) return found;
    const status: DisplayStatus = {
      displayId,
      connected: false,
      lastSeenAt: null,
      vitals: null,
      changedAt: null,
      simulated,
    };
    const made: Known = { status, links: [] };
    this.known.set(displayId, made);
    return made;
  }

  /** A display's socket came or went. A simulated one that went is forgotten. */
  setConnected(displayId: string, connected: boolean, now: number): void {
    const known = this.knownOf(displayId, false);
    known.status = { ...known.status, connected, lastSeenAt: now };
  }

  /** Forgets a simulated display and what it showed. */
  forget(displayId: string): void {
    this.known.delete(displayId);
    for (const map of [this.walls, this.pictures, this.pictureAt])
      for (const key of map.keys()) if (key.startsWith(`${displayId}/`)) map.delete(key);
  }

  vitals(vitals: Vitals, simulated: boolean, now: number): void {
    const known = this.knownOf(vitals.displayId, simulated);
    const before = known.status.vitals?.changes ?? null;
    const changed = before === null || vitals.changes !== before;
    known.status = {
      ...known.status,
      connected: true,
      lastSeenAt: now,
      vitals,
      changedAt: changed ? now : known.status.changedAt,
    };
    if (vitals.linkMs !== null) known.links = [...known.links.slice(1 - keptLinks), vitals.linkMs];
  }

  /**
   * Takes over what is on the wall, for screens that the show has.
   * @returns rows for the as-run log
   */
  drawn(
    list: readonly Drawn[],
    showId: string,
    room: RoomKind,
    hasScreen: (id: string) => boolean,
  ): DrawnRow[] {
    for (const { displayId, screenId, runId, at } of list) {
      if (!hasScreen(screenId)) continue;
      const key = `${displayId}/${screenId}`;
      // A report that was kept on board may come after a newer one.
      if ((this.walls.get(key)?.at ?? Number.NEGATIVE_INFINITY) <= at)
        this.walls.set(key, { displayId, screenId, runId, at });
    }
    return list.map((drawn) => ({ ...drawn, showId, room }));
  }

  /** @returns whether the picture is to be passed on */
  picture(picture: Picture, now: number): boolean {
    const key = `${picture.displayId}/${picture.screenId}`;
    if (now - (this.pictureAt.get(key) ?? Number.NEGATIVE_INFINITY) < hubLimits.pictureMs) return false;
    this.pictureAt.set(key, now);
    this.pictures.set(key, picture);
    return true;
  }

  statuses(): DisplayStatus[] {
    return [...this.known.values()].map(({ status }) => status);
  }

  wall(): OnWall[] {
    return [...this.walls.values()];
  }

  latestPictures(): Picture[] {
    return [...this.pictures.values()];
  }

  /** What the slowest display that is here needs between stamp and landing: p95 one way and a frame, ms. */
  lead(): number {
    let most: number = leadLimits.floor;
    for (const { status, links } of this.known.values()) {
      if (!status.connected || !status.vitals || links.length === 0) continue;
      const sorted = [...links].sort((a, b) => a - b);
      // Nearest rank: one slow answer in twenty does not count.
      const p95 = sorted[Math.ceil(sorted.length * 0.95) - 1] ?? 0;
      most = Math.max(most, p95 / 2 + 1000 / Math.max(10, status.vitals.fps));
    }
    return most;
  }
}
