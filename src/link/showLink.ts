import type { OutputMap } from '#shared/mapping/schema';
import { closeCodes, linkTimes, protocolVersion } from '#shared/protocol/constants';
import type { Drawn, FromHub, Picture, ToHub, Vitals } from '#shared/protocol/messages';
import type { CommandBody } from '#shared/show/commands';
import { notSentWords } from '#shared/show/words';
import {
  addExchange,
  type Clock,
  clockError,
  emptyClock,
  hubTime,
  roundTrip,
  sampleOf,
} from '#shared/time/clockFilter';
import { CommandsInFlight } from './commandsInFlight';
import { DrawnQueue } from './drawnQueue';
import { type LinkParts, openSocket, pageParts, probeHub, whyNot } from './parts';
import { passGate, pauseAfter } from './reconnect';
import { joiningSnapshot, takeMessage } from './takeMessage';
import type { CommandResult, LinkOptions, LinkSnapshot, ShowLink } from './types';

/** Questions for the time right after joining, so that the clock is good at once: ms after the welcome. */
const quickTimes = [0, 120, 240, 400, 600, 800];
const drawnAgainMs = 2000;
/** More than the exchange can explain by this: one of the two clocks was set or has slept, ms. */
const clockBroke = 1000;

const refusedWords = {
  [closeCodes.notAllowed]: 'The hub has ended this link: sign-in or role has changed.',
  [closeCodes.gone]: 'This show is gone.',
} as Record<number, string>;

const newId = (): string => {
  // randomUUID wants a secure page; a phone on the venue's plain network has none.
  const bytes = crypto.getRandomValues(new Uint8Array(12));
  return Array.from(bytes, (byte) => byte.toString(36).padStart(2, '0')).join('');
};

/** The socket of one page to one room: joins again by itself, keeps the hub's time, sends commands that never fire late. */
class Link implements ShowLink {
  private snapshot: LinkSnapshot = joiningSnapshot;
  private readonly listeners = new Set<() => void>();
  private readonly drafts = new Set<(displayId: string, map: OutputMap) => void>();
  private readonly reloads = new Set<(displayId: string) => void>();
  private readonly commands = new CommandsInFlight();
  private readonly drawn: DrawnQueue;
  private socket: WebSocket | null = null;
  private clock: Clock = emptyClock;
  /** Hub time minus page time as the welcome had it, good until the first exchange, ms. */
  private roughOffset = performance.timeOrigin;
  /** True from a hello until its answer. */
  private asking = false;
  /** Sockets in a row that closed before they were welcomed. */
  private failures = 0;
  private tickedAt = 0;
  private readonly waiting = new Set<() => void>();
  private readonly stopWake: () => void;
  private heardAt = 0;
  private drawnSentAt = Number.NEGATIVE_INFINITY;
  private stopped = false;
  private readonly ticker: ReturnType<typeof setInterval>;
  private readonly quick = new Set<ReturnType<typeof setTimeout>>();

  constructor(
    private readonly options: LinkOptions,
    private readonly parts: LinkParts,
  ) {
    const { showId, room, as } = options;
    this.drawn = new DrawnQueue(`lampyrid.drawn/${showId}/${room}`, as === 'display' ? parts.store : null);
    this.ticker = setInterval(() => this.tick(), linkTimes.heartbeat);
    this.stopWake = parts.onWake(() => this.wake());
    void this.join();
  }

  getSnapshot(): LinkSnapshot {
    return this.snapshot;
  }

  subscribe(listener: () => void): () => void {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  }

  private set(change: Partial<LinkSnapshot>): void {
    this.become({ ...this.snapshot, ...change });
  }

  private become(next: LinkSnapshot): void {
    if (next === this.snapshot) return;
    this.snapshot = next;
    for (const listener of this.listeners) listener();
  }

  hubNow(): number {
    return this.hubTimeOf(this.parts.now());
  }

  hubTimeOf(performanceMs: number): number {
    const at = hubTime(this.clock, performanceMs);
    return Number.isNaN(at) ? this.roughOffset + performanceMs : at;
  }

  private async join(): Promise<void> {
    const { showId, room, as } = this.options;
    const path = `/hub?show=${encodeURIComponent(showId)}&room=${room}&as=${as}`;
    // A hub that takes sockets only to close them is not asked at full speed.
    if (this.failures > 0) await this.wait(pauseAfter(this.failures));
    const passed = await passGate({
      probe: (limitMs) => probeHub(this.parts, limitMs),
      open: (limitMs) => openSocket(this.parts, path, limitMs),
      whyNot: () => whyNot(this.parts, this.options),
      wait: (ms) => this.wait(ms),
      stopped: () => this.stopped,
    });
    if (!passed) return;
    if ('refused' in passed) return this.shutOut(passed.refused);
    this.seat(passed);
  }

  private seat(socket: WebSocket): void {
    if (this.stopped) return socket.close();
    this.socket = socket;
    this.failures += 1;
    this.heardAt = this.parts.now();
    socket.onmessage = (event) => this.hear(String(event.data));
    socket.onclose = (event) => this.lost(socket, event.code);
    // What went wrong is told by the close that follows.
    socket.onerror = () => undefined;
    this.hello();
  }

  /** A pause that ends early when the page or its network wakes. */
  private wait(ms: number): Promise<void> {
    return new Promise((resolve) => {
      const done = (): void => {
        clearTimeout(timer);
        this.waiting.delete(done);
        resolve();
      };
      const timer = setTimeout(done, ms);
      this.waiting.add(done);
    });
  }

  private wake(): void {
    for (const done of this.waiting) done();
    this.tick();
  }

  private hello(): void {
    if (this.asking) return;
    this.asking = true;
    const { epoch = null, revision = null } = this.snapshot.state ?? {};
    this.put({ type: 'hello', protocol: protocolVersion, epoch, revision });
  }

  private put(message: ToHub): boolean {
    if (this.socket?.readyState !== 1) return false;
    this.socket.send(JSON.stringify(message));
    return true;
  }

  private lost(socket: WebSocket, code: number): void {
    if (this.socket !== socket) return;
    this.socket = null;
    this.asking = false;
    this.clearQuick();
    const words = refusedWords[code];
    if (words) return this.shutOut(words);
    if (code === closeCodes.versionMismatch) {
      this.set({ status: 'outdated', awaySince: this.parts.now() });
      return this.commands.giveUp();
    }
    this.away();
    void this.join();
  }

  private shutOut(words: string): void {
    this.set({ status: 'refused', refusedWhy: words, awaySince: this.parts.now() });
    this.commands.giveUp();
  }

  private away(): void {
    if (this.snapshot.status !== 'on') return;
    this.set({ status: 'away', awaySince: this.parts.now(), linkMs: null });
  }

  private hear(text: string): void {
    this.heardAt = this.parts.now();
    let message: FromHub;
    try {
      // Our own hub of the same version made it; a full check of each message would cost the phone its battery.
      message = JSON.parse(text) as FromHub;
    } catch {
      return;
    }
    this.take(message);
  }

  private take(message: FromHub): void {
    switch (message.type) {
      case 'time':
        return this.takeTime(message);
      case 'taken':
      case 'refused':
        return this.commands.take(message);
      case 'logged':
        if (this.drawn.logged(message.displayId, message.seq)) this.sendDrawnNow();
        return;
      case 'draft':
        for (const listener of this.drafts) listener(message.displayId, message.map);
        return;
      case 'reload':
        for (const listener of this.reloads) listener(message.displayId);
        return;
    }
    if (message.type === 'welcome' || message.type === 'resume') this.asking = false;
    const { snapshot, hole } = takeMessage(this.snapshot, message);
    this.become(snapshot);
    if (hole) this.hello();
    if (message.type === 'welcome' || message.type === 'resume') this.arrived(message.hubNow);
  }

  private arrived(hubNow: number): void {
    this.failures = 0;
    this.roughOffset = hubNow - this.parts.now();
    this.clearQuick();
    for (const ms of quickTimes) {
      const timer = setTimeout(() => {
        this.quick.delete(timer);
        this.askTime();
      }, ms);
      this.quick.add(timer);
    }
    this.sendDrawnNow();
  }

  private clearQuick(): void {
    for (const timer of this.quick) clearTimeout(timer);
    this.quick.clear();
  }

  private askTime(): void {
    this.put({ type: 'time', t1: this.parts.now() });
  }

  private takeTime({ t1, t2, t3 }: Extract<FromHub, { type: 'time' }>): void {
    const exchange = { t1, t2, t3, t4: this.parts.now() };
    const { offset, delay } = sampleOf(exchange);
    const error = Math.abs(exchange.t4 + offset - hubTime(this.clock, exchange.t4));
    // Many machines stop their monotonic clock while they sleep: minutes are then missing that no slewing brings back.
    const broke = error > clockBroke + Math.max(0, delay);
    this.clock = addExchange(broke ? emptyClock : this.clock, exchange);
    this.set({ linkMs: roundTrip(this.clock), clockErrorMs: clockError(this.clock) });
  }

  private tick(): void {
    const now = this.parts.now();
    const held = now - this.tickedAt > 2 * linkTimes.heartbeat;
    this.tickedAt = now;
    if (!this.socket) return;
    // A page that was held up itself has words waiting to be read: silence counts only once the hub must have cut it.
    if (now - this.heardAt > (held ? linkTimes.idle : linkTimes.silence)) {
      // Half-open: the other side is gone and nobody has told us.
      const silent = this.socket;
      silent.onmessage = null;
      silent.close();
      return this.lost(silent, 1006);
    }
    this.askTime();
    this.sendDrawn();
  }

  async send(
    body: CommandBody,
    { expiryMs = linkTimes.expiry }: { expiryMs?: number } = {},
  ): Promise<CommandResult> {
    if (this.snapshot.status !== 'on') return { outcome: 'not-sent', words: notSentWords.noLink };
    const command = { id: newId(), expiresAt: this.hubNow() + expiryMs, body };
    if (!this.put({ type: 'command', command })) return { outcome: 'not-sent', words: notSentWords.noLink };
    return this.commands.wait(command.id, expiryMs);
  }

  reportVitals(vitals: Vitals): void {
    if (this.snapshot.status === 'on') this.put({ type: 'vitals', vitals });
  }

  reportPicture(picture: Picture): void {
    if (this.snapshot.status === 'on') this.put({ type: 'picture', picture });
  }

  reportDrawn(drawn: Omit<Drawn, 'seq'>): void {
    this.drawn.add(drawn);
    this.sendDrawnNow();
  }

  private sendDrawnNow(): void {
    this.drawnSentAt = Number.NEGATIVE_INFINITY;
    this.sendDrawn();
  }

  private sendDrawn(): void {
    if (this.snapshot.status !== 'on' || this.drawn.size === 0) return;
    const now = this.parts.now();
    if (now - this.drawnSentAt < drawnAgainMs) return;
    this.drawnSentAt = now;
    for (const drawn of this.drawn.waiting()) this.put({ type: 'drawn', drawn });
  }

  onDraft(listener: (displayId: string, map: OutputMap) => void): () => void {
    this.drafts.add(listener);
    return () => this.drafts.delete(listener);
  }

  onReload(listener: (displayId: string) => void): () => void {
    this.reloads.add(listener);
    return () => this.reloads.delete(listener);
  }

  close(): void {
    this.stopped = true;
    clearInterval(this.ticker);
    this.stopWake();
    for (const done of this.waiting) done();
    this.clearQuick();
    this.commands.giveUp();
    const socket = this.socket;
    this.socket = null;
    socket?.close();
  }
}

/** Joins one room of a show. `parts` are those of the page unless given. */
export const createShowLink = (options: LinkOptions, parts: LinkParts = pageParts()): ShowLink =>
  new Link(options, parts);
