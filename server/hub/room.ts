import { randomBytes, randomInt } from 'node:crypto';
import type { HubStore, OpenedRoom } from '#server/services/hubStore';
import type { Log } from '#server/services/log';
import type { HubShow } from '#server/services/manifest';
import type { OutputMap } from '#shared/mapping/schema';
import { closeCodes, protocolVersion } from '#shared/protocol/constants';
import type { FromHub, RefusalCode, ToHub } from '#shared/protocol/messages';
import { type Command, transientKinds } from '#shared/show/commands';
import { type DecideContext, decide, type KnownScene } from '#shared/show/decide';
import type { EventBody, ShowEvent } from '#shared/show/events';
import { reduce } from '#shared/show/reduce';
import type { RoomKind, ShowState } from '#shared/show/state';
import { refusalWords } from '#shared/show/words';
import { hubNow } from './hubClock';
import type { Durable, Journal } from './journal';
import { RoomDisplays } from './roomDisplays';
import { encode, type Seat } from './seat';
import { type Report, Speakers } from './speakers';

export interface RoomParts {
  showId: string;
  room: RoomKind;
  opened: OpenedRoom;
  show: HubShow;
  journal: Journal;
  store: HubStore;
  log: Log;
  /** Called with each frame that is encoded, so that a test can count them. */
  onEncode?: () => void;
}

interface Answered {
  landsAt: number | null;
  /** Known once the event is in the database or the file. */
  kept: boolean | Promise<boolean>;
}

/** Events that a page may have missed and still gets one by one. */
const keptEvents = 500;
const keptAnswers = 4000;
const snapshotEvery = 200;
/** How often news of displays goes to the crew, ms. */
const statusMs = 250;
const wallMs = 40;

/** One show in one mode: whoever is there, what was ordered, what is on the wall. */
export class Room {
  readonly seats = new Set<Seat>();
  private state: ShowState;
  private readonly events: ShowEvent[] = [];
  private readonly answers = new Map<string, Answered>();
  private readonly displays: RoomDisplays;
  private show: HubShow;
  private scenes: ReadonlyMap<string, KnownScene> = new Map();
  private screens: ReadonlySet<string> = new Set();
  private phases: ReadonlySet<string> = new Set();
  private sinceSnapshot = 0;
  private readonly timers = new Map<string, ReturnType<typeof setTimeout>>();
  private readonly seenAt = new Map<string, number>();
  private readonly speakers = new Speakers();
  readonly kind: RoomKind;
  private closing = false;

  constructor(private readonly parts: RoomParts) {
    this.state = parts.opened.state;
    this.kind = parts.room;
    this.show = parts.show;
    this.displays = new RoomDisplays(
      parts.room === 'live' ? Object.keys(parts.show.displayNames) : [],
      parts.opened.wall,
    );
    for (const id of parts.opened.commandIds) this.answers.set(id, { landsAt: null, kept: true });
    this.readShow();
  }

  /** Looks up once what every command asks for. */
  private readShow(): void {
    this.screens = new Set(this.show.manifest.screens.map(({ id }) => id));
    this.phases = new Set(this.show.phaseIds);
    this.scenes = new Map(
      this.show.manifest.scenes.map(({ id, version, body }) => [
        id,
        { version, transition: body.transition, dials: body.dials.map(({ value }) => value) },
      ]),
    );
  }

  /** Whose show it is. */
  get crewId(): string {
    return this.show.crewId;
  }

  /** Takes a seat that has said hello. */
  join(seat: Seat, hello: Extract<ToHub, { type: 'hello' }>): void {
    if (hello.protocol !== protocolVersion) return seat.close(closeCodes.versionMismatch, 'version');
    if (this.closing) return seat.close(closeCodes.shuttingDown, 'shutting down');
    const again = seat.ready;
    seat.ready = true;
    this.seats.add(seat);
    if (seat.who.kind === 'display' && !again) {
      this.displays.setConnected(seat.who.displayId, true, hubNow());
      this.later('displays', statusMs, () => this.tellDisplays());
    }
    const missed = this.missedSince(hello);
    if (missed) seat.send({ type: 'resume', events: missed, hubNow: hubNow() });
    else this.welcome(seat);
    if (seat.who.kind === 'crew') {
      if (missed) this.catchUp(seat);
      for (const picture of this.displays.latestPictures()) seat.send({ type: 'picture', picture });
    } else if (missed) seat.send({ type: 'manifest', manifest: this.show.manifest });
  }

  /** What a resumed page of the crew may have missed besides events. */
  private catchUp(seat: Seat): void {
    seat.send({ type: 'manifest', manifest: this.show.manifest });
    seat.send(this.displaysMessage());
    seat.send({ type: 'wall', wall: this.displays.wall() });
    seat.send({ type: 'mode', mode: this.show.mode });
    seat.send({ type: 'durable', durable: this.parts.journal.durable() });
  }

  private missedSince({
    epoch,
    revision,
  }: {
    epoch: number | null;
    revision: number | null;
  }): ShowEvent[] | null {
    if (epoch !== this.state.epoch || revision === null || revision > this.state.revision) return null;
    const first = this.events[0]?.revision ?? this.state.revision + 1;
    if (revision < first - 1) return null;
    return this.events.filter((event) => event.revision > revision);
  }

  private welcome(seat: Seat): void {
    const { maps, displayNames, manifest, mode } = this.show;
    const own = seat.who.kind === 'display' ? seat.who.displayId : null;
    const pick = <T>(all: Record<string, T>): Record<string, T> =>
      own === null ? all : Object.fromEntries(Object.entries(all).filter(([id]) => id === own));
    seat.send({
      type: 'welcome',
      protocol: protocolVersion,
      principal: seat.principal === 'anyone' ? 'display' : seat.principal,
      displayId: own,
      state: this.state,
      manifest,
      maps: pick(maps),
      displayNames: pick(displayNames),
      displays: own === null ? this.displays.statuses() : [],
      wall: own === null ? this.displays.wall() : [],
      mode,
      hubNow: hubNow(),
      durable: this.parts.journal.durable(),
    });
  }

  /** A seat is gone. Its simulated displays go with it. */
  leave(seat: Seat): void {
    if (!this.seats.delete(seat)) return;
    if (seat.who.kind === 'display') {
      const { displayId } = seat.who;
      const elsewhere = [...this.seats].some((other) => other.by === displayId);
      if (!elsewhere) this.displays.setConnected(displayId, false, hubNow());
    } else for (const displayId of this.speakers.leave(seat)) this.displays.forget(displayId);
    this.later('displays', statusMs, () => this.tellDisplays());
  }

  private context(seat: Seat, now: number): DecideContext {
    return {
      now,
      lead: this.displays.lead(),
      principal: seat.principal,
      mode: this.show.mode,
      scenes: this.scenes,
      screens: this.screens,
      phases: this.phases,
      displays: new Set(this.displays.statuses().map(({ displayId }) => displayId)),
      makeRun: () => ({ runId: randomBytes(9).toString('base64url'), seed: randomInt(2 ** 31) }),
    };
  }

  /** Orders, stamps, applies and answers one command. */
  command(seat: Seat, command: Command): void {
    const { id: commandId, body } = command;
    const now = hubNow();
    const before = this.answers.get(commandId);
    if (before) return this.repeat(seat, commandId, before, now);
    const draft = body.kind === 'map.draft';
    if (this.closing) return this.refuse(seat, commandId, 'shutting-down');
    if (!(draft ? seat.within.draft(now) : seat.within.command(now)))
      return this.refuse(seat, commandId, 'too-many');
    const decision = decide(this.state, command, this.context(seat, now));
    if ('refusal' in decision) return this.refuse(seat, commandId, decision.refusal);
    if (transientKinds.has(body.kind)) return this.passOn(seat, command);
    const [event] = decision.events.map((made) => this.stamp(made, now, commandId, seat.by));
    if (!event) return seat.send({ type: 'taken', commandId, revision: null, landsAt: null });
    const landsAt = event.body.kind === 'scene.fired' ? event.body.run.landsAt : null;
    seat.send({ type: 'taken', commandId, revision: event.revision, landsAt });
    const kept = this.keep(event);
    this.remember(commandId, { landsAt, kept });
    void kept.then((sure) => seat.send({ type: 'kept', commandId, kept: sure }));
  }

  /** Answers a command that was taken before, perhaps over another socket. */
  private repeat(seat: Seat, commandId: string, { landsAt, kept }: Answered, now: number): void {
    if (!seat.within.other(now)) return;
    seat.send({ type: 'taken', commandId, revision: null, landsAt });
    void Promise.resolve(kept).then((sure) => seat.send({ type: 'kept', commandId, kept: sure }));
  }

  private refuse(seat: Seat, commandId: string, code: RefusalCode): void {
    seat.send({ type: 'refused', commandId, code, words: refusalWords[code] });
  }

  private remember(commandId: string, answer: Answered): void {
    this.answers.set(commandId, answer);
    const oldest = this.answers.size > keptAnswers ? this.answers.keys().next().value : undefined;
    if (oldest !== undefined) this.answers.delete(oldest);
  }

  /** Applies an event and tells everybody. The picture changes before the disk has it. */
  private stamp(body: EventBody, at: number, commandId: string | null, by: string | null): ShowEvent {
    const { epoch, revision } = this.state;
    const event: ShowEvent = { epoch, revision: revision + 1, at, commandId, by, body };
    this.state = reduce(this.state, event);
    this.events.push(event);
    if (this.events.length > keptEvents) this.events.splice(0, this.events.length - keptEvents);
    this.broadcast({ type: 'event', event });
    return event;
  }

  private async keep(event: ShowEvent): Promise<boolean> {
    const { showId, room } = this.parts;
    const kept = await this.parts.journal.append({ ...event, showId, room });
    this.sinceSnapshot += 1;
    // Beside the answer, never before it.
    if (this.sinceSnapshot >= snapshotEvery) void this.snapshot();
    return kept;
  }

  /** Writes the state down so that the next start reads little. Not needed for safety: events are. */
  async snapshot(): Promise<void> {
    if (this.sinceSnapshot === 0 || this.parts.journal.durable() !== 'database') return;
    this.sinceSnapshot = 0;
    await this.parts.journal.flush();
    await this.parts.store
      .snapshot(this.state)
      .catch((error: unknown) => this.parts.log.warn({ err: error }, 'no snapshot was written'));
  }

  /** What is passed on and forgotten: to the display it is for, and to the crew's other pages. */
  private passOn(seat: Seat, { id: commandId, body }: Command): void {
    const message: FromHub | null =
      body.kind === 'map.draft'
        ? { type: 'draft', displayId: body.displayId, map: body.map, by: seat.by }
        : body.kind === 'display.reload'
          ? { type: 'reload', displayId: body.displayId }
          : null;
    if (message && 'displayId' in message)
      this.broadcast(
        message,
        (other) => other !== seat && (other.who.kind === 'crew' || other.by === message.displayId),
      );
    seat.send({ type: 'taken', commandId, revision: null, landsAt: null });
  }

  /** Encodes once, sends to all that have been welcomed. */
  broadcast(message: FromHub, to: (seat: Seat) => boolean = () => true): void {
    let frame: Buffer | null = null;
    for (const seat of this.seats) {
      if (!seat.ready || !to(seat)) continue;
      if (!frame) {
        frame = encode(message);
        this.parts.onEncode?.();
      }
      seat.sendFrame(frame);
    }
  }

  private toCrew(message: FromHub): void {
    this.broadcast(message, (seat) => seat.who.kind === 'crew');
  }

  /** Whether a seat may speak for a display: itself, or a simulated one in the rehearsal. */
  speaksFor(seat: Seat, displayId: string): boolean {
    if (seat.who.kind === 'display') return seat.who.displayId === displayId;
    return this.parts.room === 'rehearsal' && displayId.startsWith('sim-');
  }

  /** A report of a display that the seat speaks for. */
  report(seat: Seat, message: Report, displayId: string): void {
    const now = hubNow();
    if (seat.who.kind === 'crew' && !this.speakers.admit(seat, displayId)) return;
    if (message.type === 'vitals') {
      this.displays.vitals(message.vitals, seat.who.kind === 'crew', now);
      if (seat.who.kind === 'display') this.noteSeen(displayId, message.vitals.raster, now);
      this.later('displays', statusMs, () => this.tellDisplays());
    } else if (message.type === 'picture') {
      if (!this.screens.has(message.picture.screenId)) return;
      if (this.displays.picture(message.picture, now)) this.toCrew(message);
    } else {
      const { showId, room, store, log } = this.parts;
      const rows = this.displays.drawn(message.drawn, showId, room, (id) => this.screens.has(id));
      this.later('wall', wallMs, () => this.toCrew({ type: 'wall', wall: this.displays.wall() }));
      const seq = Math.max(...rows.map((row) => row.seq));
      const logged = () => seat.send({ type: 'logged', displayId, seq });
      // A rehearsal leaves no trace in the record of the night.
      if (room === 'rehearsal') return logged();
      // Unanswered reports are sent again by the display: nothing is lost while the database is away.
      store.drawn(rows).then(logged, (error: unknown) => log.warn({ err: error }, 'drawn reports wait'));
    }
  }

  private noteSeen(displayId: string, raster: readonly [number, number], now: number): void {
    if (now - (this.seenAt.get(displayId) ?? Number.NEGATIVE_INFINITY) < 10_000) return;
    this.seenAt.set(displayId, now);
    this.parts.store
      .seen(displayId, raster)
      .catch((error: unknown) => this.parts.log.debug({ err: error }, 'last seen was not written'));
  }

  private displaysMessage(): FromHub {
    return { type: 'displays', displays: this.displays.statuses(), names: this.show.displayNames };
  }

  private tellDisplays(): void {
    this.toCrew(this.displaysMessage());
  }

  /** Does a work once, `ms` after it was first asked for. */
  private later(name: string, ms: number, work: () => void): void {
    if (this.closing || this.timers.has(name)) return;
    this.timers.set(
      name,
      setTimeout(() => {
        this.timers.delete(name);
        work();
      }, ms),
    );
  }

  /** What the database says of the show now: tells pages what has changed. */
  refresh(show: HubShow): void {
    const before = this.show;
    this.show = show;
    this.readShow();
    if (before.manifest.revision !== show.manifest.revision)
      this.broadcast({ type: 'manifest', manifest: show.manifest });
    if (before.mode !== show.mode) this.broadcast({ type: 'mode', mode: show.mode });
    if (this.parts.room === 'live') this.displays.setJoined(Object.keys(show.displayNames));
    this.tellDisplays();
    for (const [displayId, map] of Object.entries(show.maps))
      if (!before.maps[displayId]) this.broadcast({ type: 'draft', displayId, map, by: null });
  }

  /** A map has been saved: an event of the server's own, so that every page takes it over and drafts end. */
  mapSaved(displayId: string, version: number, map: OutputMap, by: string | null): void {
    this.show = { ...this.show, maps: { ...this.show.maps, [displayId]: map } };
    void this.keep(this.stamp({ kind: 'map.saved', displayId, version, map }, hubNow(), null, by));
  }

  tellDurable(durable: Durable): void {
    this.broadcast({ type: 'durable', durable });
    // What could be kept nowhere while it was away is at least part of the state that is written down now.
    if (durable === 'database') void this.snapshot();
  }

  /** The show is no more: sends everybody away. */
  end(): void {
    this.closing = true;
    for (const timer of this.timers.values()) clearTimeout(timer);
    for (const seat of this.seats) seat.close(closeCodes.gone, 'this show is gone');
  }

  /** Takes no more commands, waits until all is kept and answered, writes the state down, says goodbye. */
  async close(): Promise<void> {
    this.closing = true;
    for (const timer of this.timers.values()) clearTimeout(timer);
    await this.parts.journal.flush();
    await this.snapshot();
    for (const seat of this.seats) seat.close(closeCodes.shuttingDown, 'shutting down');
  }
}
