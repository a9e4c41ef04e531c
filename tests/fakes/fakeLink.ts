import type { Manifest } from '#shared/protocol/messages';
import type { CommandBody } from '#shared/show/commands';
import { type DecideContext, decide } from '#shared/show/decide';
import type { EventBody } from '#shared/show/events';
import { reduce, startState } from '#shared/show/reduce';
import type { Role } from '#shared/show/roles';
import { notSentWords, refusalWords } from '#shared/show/words';
import type { CommandResult, LinkSnapshot, ShowLink } from '@/link/types';

export interface FakeLink extends ShowLink {
  /** Every command that reached the hub. */
  readonly sent: CommandBody[];
  /** Replaces parts of what the page knows. */
  set(change: Partial<LinkSnapshot>): void;
  /** Hub time moves on; it stands still otherwise. */
  pass(ms: number): void;
  /** A display says what it drew on a screen. */
  draws(displayId: string, screenId: string, runId: string | null): void;
  /** From now on the hub takes commands and gives no answer until this is called. */
  holdAnswers(): () => void;
}

/**
 * A hub in one object, with the real decisions and the real reducer, and a clock that the test moves. Its fixed lead is
 * 50 ms. Hub time = page time + 1 000 000 ms, so that a mix-up of the two shows.
 */
export const fakeLink = (
  manifest: Manifest,
  phaseIds: readonly string[] = [],
  principal: Role = 'vj',
): FakeLink => {
  const listeners = new Set<() => void>();
  const sent: CommandBody[] = [];
  let now = 1_000_000;
  let runs = 0;
  let answers: Promise<void> = Promise.resolve();
  let snapshot: LinkSnapshot = {
    status: 'on',
    awaySince: null,
    refusedWhy: null,
    principal,
    displayId: null,
    state: startState('show-1', 'live', now),
    manifest,
    maps: {},
    displayNames: {},
    displays: [],
    wall: [],
    pictures: {},
    mode: 'live',
    durable: 'database',
    linkMs: 9,
    clockErrorMs: 1,
  };
  const set = (change: Partial<LinkSnapshot>) => {
    snapshot = { ...snapshot, ...change };
    for (const listener of listeners) listener();
  };
  const context = (): DecideContext => ({
    now,
    lead: 50,
    principal: snapshot.principal ?? 'anyone',
    mode: snapshot.mode ?? 'live',
    scenes: new Map(
      manifest.scenes.map(({ id, version, body }) => [
        id,
        { version, transition: body.transition, dials: body.dials.map(({ value }) => value) },
      ]),
    ),
    screens: new Set(manifest.screens.map(({ id }) => id)),
    phases: new Set(phaseIds),
    displays: new Set(snapshot.displays.map(({ displayId }) => displayId)),
    makeRun: () => {
      runs += 1;
      return { runId: `run-${runs}`, seed: runs };
    },
  });
  const apply = (bodies: readonly EventBody[]): number | null => {
    const before = snapshot.state;
    if (!before) return null;
    const state = bodies.reduce(
      (held, body) =>
        reduce(held, {
          epoch: held.epoch,
          revision: held.revision + 1,
          at: now,
          commandId: null,
          by: null,
          body,
        }),
      before,
    );
    set({ state });
    const [first] = bodies;
    return first?.kind === 'scene.fired' ? first.run.landsAt : null;
  };
  const answer = (body: CommandBody): CommandResult => {
    if (snapshot.status !== 'on' || !snapshot.state)
      return { outcome: 'not-sent', words: notSentWords.noLink };
    sent.push(body);
    const decision = decide(
      snapshot.state,
      { id: `c${sent.length}`, expiresAt: now + 1000, body },
      context(),
    );
    if ('refusal' in decision)
      return { outcome: 'refused', code: decision.refusal, words: refusalWords[decision.refusal] };
    const landsAt = apply(decision.events);
    return { outcome: 'taken', revision: snapshot.state.revision, landsAt };
  };
  return {
    sent,
    set,
    pass: (ms) => {
      now += ms;
      set({});
    },
    draws: (displayId, screenId, runId) =>
      set({
        wall: [
          ...snapshot.wall.filter((seen) => seen.displayId !== displayId || seen.screenId !== screenId),
          { displayId, screenId, runId, at: now },
        ],
      }),
    holdAnswers: () => {
      let free = () => {};
      answers = new Promise((resolve) => {
        free = resolve;
      });
      return free;
    },
    getSnapshot: () => snapshot,
    subscribe: (listener) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    hubNow: () => now,
    hubTimeOf: (performanceMs) => performanceMs + 1_000_000,
    send: async (body) => {
      await answers;
      return answer(body);
    },
    reportVitals: () => {},
    reportDrawn: () => {},
    reportPicture: () => {},
    onDraft: () => () => {},
    onReload: () => () => {},
    close: () => set({ status: 'away' }),
  };
};
