import type { Manifest } from '#shared/protocol/messages';
import { settle } from '#shared/show/reduce';
import type { LinkSnapshot } from '@/link/types';
import type { Alarm } from './alarms';

interface Props {
  snapshot: LinkSnapshot;
  alarms: readonly Alarm[];
  /** Hub time, ms. */
  now: number;
}

const age = (ms: number): string =>
  ms < 10_000 ? `${(ms / 1000).toFixed(1)} s` : `${Math.round(ms / 1000)} s`;

/** Hours and minutes. */
const upTime = (seconds: number): string =>
  `${Math.floor(seconds / 3600)} h ${String(Math.floor((seconds % 3600) / 60)).padStart(2, '0')}`;

/** Names of the scenes that a display has reported as drawn. */
const shows = (displayId: string, snapshot: LinkSnapshot): string => {
  const runs = snapshot.wall.filter((one) => one.displayId === displayId && one.runId);
  const names = runs.map(({ screenId, runId }) => sceneOfRun(snapshot, screenId, runId, snapshot.manifest));
  return [...new Set(names.filter((name) => name !== null))].join(', ') || 'nothing yet';
};

const sceneOfRun = (
  { state }: LinkSnapshot,
  screenId: string,
  runId: string | null,
  manifest: Manifest | null,
): string | null => {
  const screen = state?.screens[screenId];
  if (!screen || !state) return null;
  const { previous, current, next } = settle(screen, state.at);
  const run = [next, current, previous].find((one) => one?.runId === runId);
  return manifest?.scenes.find((scene) => scene.id === run?.sceneId)?.name ?? null;
};

const stateWords = (alarm: Alarm | undefined) =>
  alarm ? (
    <span className={alarm.severity === 'broken' ? 'text-(--coral)' : 'text-(--amber)'}>
      {alarm.severity === 'broken' ? '✕ ' : '▲ '}
      {alarm.key.split(' ')[0] === 'lost' ? 'no link' : 'look'}
    </span>
  ) : (
    <span className="text-(--quiet)">fine</span>
  );

const heads = [
  'Display',
  'Shows',
  'Frames a second',
  'Longest gap',
  'Clock within',
  'Link',
  'Files on board',
  'Output',
  'Page',
  'Up',
  'Last word',
  '',
];

/** Every display's vitals, each with the age of its last word. */
export const VitalsTable = ({ snapshot, alarms, now }: Props) => (
  <section
    // biome-ignore lint/a11y/noNoninteractiveTabindex: what scrolls must be reached by keys
    tabIndex={0}
    className="overflow-x-auto rounded-xl bg-(--raised)"
    aria-label="Vitals of the displays"
  >
    <table className="w-full min-w-[60rem] text-left">
      <thead>
        <tr className="text-sm text-(--quiet)">
          {heads.map((head) => (
            <th key={head} scope="col" className="px-3 py-3 font-normal">
              {head || <span className="sr-only">State</span>}
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        {snapshot.displays
          .filter((status) => !status.simulated)
          .map((status) => {
            const { vitals } = status;
            const alarm = alarms.find((one) => one.displayId === status.displayId);
            const number = 'px-3 py-3 font-mono whitespace-nowrap';
            const live = status.connected && vitals;
            return (
              <tr key={status.displayId} className="border-t border-(--line)">
                <th scope="row" className="px-3 py-3 font-bold whitespace-nowrap">
                  {snapshot.displayNames[status.displayId] ?? 'Display'}
                </th>
                <td className="px-3 py-3">{shows(status.displayId, snapshot)}</td>
                <td className={number}>{live ? Math.round(vitals.fps) : '–'}</td>
                <td className={number}>{live ? `${Math.round(vitals.longestMs)} ms` : '–'}</td>
                <td className={number}>
                  {live && vitals.clockErrorMs !== null ? `±${vitals.clockErrorMs.toFixed(1)} ms` : '–'}
                </td>
                <td className={number}>
                  {live && vitals.linkMs !== null ? `${vitals.linkMs.toFixed(0)} ms` : '–'}
                </td>
                <td className={number}>{vitals ? `${vitals.filesOnBoard} / ${vitals.filesWanted}` : '–'}</td>
                <td className={number}>{vitals ? vitals.raster.join('×') : '–'}</td>
                <td className="px-3 py-3 text-sm">
                  {live
                    ? [
                        vitals.visible ? 'in front' : 'hidden',
                        vitals.fullscreen ? 'full screen' : 'in a window',
                        vitals.awake ? 'stays awake' : 'may sleep',
                      ].join(', ')
                    : '–'}
                </td>
                <td className={number}>{live ? upTime(vitals.upS) : '–'}</td>
                <td className={number}>
                  {status.lastSeenAt === null ? 'never' : age(Math.max(0, now - status.lastSeenAt))}
                </td>
                <td className="px-3 py-3 whitespace-nowrap">{stateWords(alarm)}</td>
              </tr>
            );
          })}
      </tbody>
    </table>
  </section>
);
