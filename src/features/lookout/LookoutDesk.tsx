import { useState } from 'react';
import { may } from '#shared/show/roles';
import type { Screen } from '#shared/venue/schema';
import type { LinkSnapshot, ShowLink } from '@/link/types';
import { AlarmList } from './AlarmList';
import { alarmsOf } from './alarms';
import { VitalsTable } from './VitalsTable';

interface Props {
  link: ShowLink;
  snapshot: LinkSnapshot;
  screens: readonly Screen[];
  /** Hub time, ms; moves on a few times a second. */
  now: number;
}

const keptWords = {
  database: null,
  spill: 'The database is away. The show goes on and is kept in a file beside it.',
  none: 'The night is not being kept: database and disk refuse. The show goes on.',
} as const;

/** Alarms, then every display's vitals. */
export const LookoutDesk = ({ link, snapshot, screens, now }: Props) => {
  const [said, setSaid] = useState<string | null>(null);
  const alarms = alarmsOf({
    displays: snapshot.displays,
    names: snapshot.displayNames,
    maps: snapshot.maps,
    screens,
    now,
  });
  const ask = async (body: Parameters<ShowLink['send']>[0]) => {
    const answer = await link.send(body);
    setSaid(answer.outcome === 'taken' ? null : answer.words);
  };
  const reloads = snapshot.principal !== null && may(snapshot.principal, 'command:display.reload');
  const kept = keptWords[snapshot.durable];
  const real = snapshot.displays.filter((status) => !status.simulated);
  return (
    <div className="flex flex-col gap-3">
      {kept && <p className="rounded-xl border border-(--amber) p-4 text-(--amber)">▲ {kept}</p>}
      <AlarmList
        alarms={alarms}
        onIdentify={(displayId) => void ask({ kind: 'display.identify', displayId })}
        onReload={reloads ? (displayId) => void ask({ kind: 'display.reload', displayId }) : null}
      />
      {said && (
        <p role="status" className="text-(--amber)">
          {said}
        </p>
      )}
      {alarms.length === 0 && real.length > 0 && (
        <p className="text-(--quiet)">
          Nothing to do. {real.length === 1 ? 'One display draws.' : `All ${real.length} displays draw.`}
        </p>
      )}
      {real.length > 0 ? (
        <VitalsTable snapshot={snapshot} alarms={alarms} now={now} />
      ) : (
        <p className="rounded-xl bg-(--raised) p-6 text-(--quiet)">
          No display has joined yet. Open <code className="font-mono">/display</code> on a machine and type
          its code under Outputs.
        </p>
      )}
    </div>
  );
};
