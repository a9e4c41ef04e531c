import { useState } from 'react';
import type { SceneRun } from '#shared/show/state';
import { useCoalesced } from '@/hooks/useCoalesced';
import { nightFacts, runningOn } from './tileState';
import type { Night } from './useNight';

/** Least time between two commands of one dial, ms. */
const dialMs = 50;

interface DialProps {
  name: string;
  value: number;
  onTurn: (value: number) => void;
}

const Dial = ({ name, value, onTurn }: DialProps) => {
  const [own, setOwn] = useState<number | null>(null);
  const push = useCoalesced(onTurn, dialMs);
  const shown = own ?? value;
  return (
    <label className="grid h-15 grid-cols-[7rem_1fr_4rem] items-center gap-2 text-[18px]">
      <span className="truncate">{name}</span>
      <input
        type="range"
        min={0}
        max={100}
        value={Math.round(shown * 100)}
        onChange={(event) => {
          const next = Number(event.target.value) / 100;
          setOwn(next);
          push(next);
        }}
        onPointerUp={() => setOwn(null)}
        onBlur={() => setOwn(null)}
        className="h-15 w-full touch-none accent-(--firefly)"
      />
      <span className="text-right font-mono">{Math.round(shown * 100)} %</span>
    </label>
  );
};

const SceneDials = ({ night, run, screenIds }: { night: Night; run: SceneRun; screenIds: string[] }) => {
  const scene = night.manifest.scenes.find(({ id }) => id === run.sceneId);
  if (!scene || scene.body.dials.length === 0) return null;
  return (
    <fieldset className="flex flex-col">
      <legend className="font-semibold text-[18px]">{scene.name}</legend>
      {scene.body.dials.map((dial, i) => (
        <Dial
          key={dial.name}
          name={dial.name}
          value={run.dials[i] ?? dial.value}
          onTurn={(value) => night.setDial(screenIds, i, value)}
        />
      ))}
    </fieldset>
  );
};

/** The dials of the scenes that run on the chosen screens. */
export const Dials = ({ night }: { night: Night }) => {
  const all = night.manifest.screens.map(({ id }) => id);
  const runs = runningOn(nightFacts(night.snapshot, all, night.now), night.chosen);
  const withDials = runs.filter(({ run }) =>
    night.manifest.scenes.some(({ id, body }) => id === run.sceneId && body.dials.length > 0),
  );
  if (withDials.length === 0)
    return <p className="text-(--quiet) text-[18px]">No dials on the chosen screens right now.</p>;
  return (
    <div className="flex flex-col gap-3">
      {withDials.map(({ run, screenIds }) => (
        <SceneDials key={run.runId} night={night} run={run} screenIds={screenIds} />
      ))}
    </div>
  );
};
