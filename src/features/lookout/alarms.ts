import type { OutputMap } from '#shared/mapping/schema';
import type { DisplayStatus } from '#shared/protocol/messages';
import type { Screen } from '#shared/venue/schema';

/** Limits of what counts as trouble. ms and frames a second. */
export const alarmLimits = {
  /** No word for this long: lost. Displays speak each second. */
  lost: 2500,
  /** Pictures unchanged for this long though the show moves: stands still. */
  stands: 3000,
  /** Below this many frames a second: slow. */
  slowFps: 40,
  /** Below this: hardly draws. */
  stalledFps: 5,
  /** Clock off by more than this. */
  clock: 25,
} as const;

export type Severity = 'broken' | 'look';
export interface Alarm {
  /** Stable while the trouble lasts. */
  key: string;
  displayId: string | null;
  severity: Severity;
  /** What is wrong, with its name and numbers. */
  what: string;
  /** What to do about it, in one line. */
  mend: string;
  screenIds: string[];
}

interface Known {
  displays: readonly DisplayStatus[];
  names: Readonly<Record<string, string>>;
  maps: Readonly<Record<string, OutputMap>>;
  screens: readonly Screen[];
  /** Hub time, ms. */
  now: number;
}

type Check = (
  status: DisplayStatus,
  now: number,
) => (Omit<Alarm, 'key' | 'displayId' | 'screenIds'> & { kind: string }) | null;

const seconds = (ms: number): string => {
  const whole = Math.max(0, Math.floor(ms / 1000));
  return whole < 120 ? `${whole} s` : `${Math.floor(whole / 60)} min`;
};

/** The first check that speaks is the display's alarm: a lost one has no frame rate. */
const checks: Check[] = [
  (status, now) =>
    status.lastSeenAt === null
      ? {
          kind: 'never',
          severity: 'look',
          what: 'has not been seen since the hub started',
          mend: 'Open /display on its machine.',
        }
      : !status.connected || now - status.lastSeenAt > alarmLimits.lost
        ? {
            kind: 'lost',
            severity: 'broken',
            what: `has no link for ${seconds(now - status.lastSeenAt)}`,
            mend: 'It goes on by itself from its own copy. Look at its cable, its network and its power.',
          }
        : null,
  ({ vitals }) =>
    vitals && vitals.fps < alarmLimits.stalledFps
      ? {
          kind: 'stalled',
          severity: 'broken',
          what: `hardly draws: ${Math.round(vitals.fps)} frames a second`,
          mend: vitals.visible ? 'Reload it.' : 'Its window is hidden: bring it to the front.',
        }
      : null,
  ({ vitals, changedAt }, now) =>
    vitals && !vitals.still && changedAt !== null && now - changedAt > alarmLimits.stands
      ? {
          kind: 'stands',
          severity: 'broken',
          what: `stands still for ${seconds(now - changedAt)}`,
          mend: 'Reload it.',
        }
      : null,
  ({ vitals }) =>
    vitals?.trouble
      ? { kind: 'trouble', severity: 'look', what: `says: ${vitals.trouble}`, mend: 'Reload it if it stays.' }
      : null,
  ({ vitals }) =>
    vitals && vitals.filesOnBoard < vitals.filesWanted
      ? {
          kind: 'files',
          severity: 'look',
          what: `has ${vitals.filesOnBoard} of ${vitals.filesWanted} files on board`,
          mend: 'Wait before firing scenes with new files.',
        }
      : null,
  ({ vitals }) =>
    vitals && vitals.fps < alarmLimits.slowFps
      ? {
          kind: 'slow',
          severity: 'look',
          what: `is slow: ${Math.round(vitals.fps)} frames a second`,
          mend: 'Close what else runs there, or give it fewer layers.',
        }
      : null,
  ({ vitals }) =>
    vitals && vitals.clockErrorMs !== null && vitals.clockErrorMs > alarmLimits.clock
      ? {
          kind: 'clock',
          severity: 'look',
          what: `may be ${Math.round(vitals.clockErrorMs)} ms off the beat`,
          mend: 'Its link is slow: use a cable.',
        }
      : null,
];

const order: Record<Severity, number> = { broken: 0, look: 1 };

/** Area of all screens an alarm touches, m²: what more of the room sees comes first. */
const area = (alarm: Alarm, screens: readonly Screen[]): number =>
  screens
    .filter((screen) => alarm.screenIds.includes(screen.id))
    .reduce((sum, screen) => sum + screen.width * screen.height, 0);

/** What is wrong now, worst and largest first. Simulated displays are left out. Pure. */
export const alarmsOf = ({ displays, names, maps, screens, now }: Known): Alarm[] => {
  const real = displays.filter((status) => !status.simulated);
  const screensOf = (id: string): string[] => [
    ...new Set((maps[id]?.regions ?? []).map((region) => region.screenId)),
  ];
  const ofDisplays = real.flatMap((status): Alarm[] => {
    for (const check of checks) {
      const found = check(status, now);
      if (!found) continue;
      const { kind, what, ...rest } = found;
      const name = names[status.displayId] ?? 'A display';
      return [
        {
          ...rest,
          key: `${kind} ${status.displayId}`,
          displayId: status.displayId,
          what: `${name} ${what}`,
          screenIds: screensOf(status.displayId),
        },
      ];
    }
    return [];
  });
  const covered = new Set(Object.keys(maps).flatMap(screensOf));
  const bare = screens
    .filter((screen) => !covered.has(screen.id))
    .map(
      (screen): Alarm => ({
        key: `bare ${screen.id}`,
        displayId: null,
        severity: 'look',
        what: `${screen.name} has no display`,
        mend: 'Join one under Outputs and give it a region of this screen.',
        screenIds: [screen.id],
      }),
    );
  return [...ofDisplays, ...bare].sort(
    (a, b) =>
      order[a.severity] - order[b.severity] ||
      area(b, screens) - area(a, screens) ||
      a.key.localeCompare(b.key),
  );
};
