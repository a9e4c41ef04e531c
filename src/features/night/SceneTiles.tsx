import { useMemo } from 'react';
import { digitOf } from './keys';
import { refusalFor } from './refusals';
import { SceneTile } from './SceneTile';
import type { Night } from './useNight';

interface Props {
  night: Night;
  /** Prints the digit that fires each tile. */
  digits?: boolean;
  /** Columns and rows of the tiles. */
  grid: string;
}

/** The scenes of the phase that is looked at, and the way to make that phase the night's. */
export const SceneTiles = ({ night, digits = false, grid }: Props) => {
  const { phase, state, tiles, snapshot } = night;
  const assets = useMemo(
    () => new Map(night.manifest.assets.map((asset) => [asset.id, asset])),
    [night.manifest],
  );
  const unready = snapshot.status !== 'on' || refusalFor(snapshot.principal, 'scene.trigger') !== null;
  const elsewhere = phase !== null && state.phaseId !== phase.id;
  return (
    <div className="flex min-h-0 min-w-0 flex-1 flex-col gap-2 overflow-y-auto overscroll-contain [scrollbar-width:none]">
      {elsewhere ? (
        <button
          type="button"
          onClick={() => night.startPhase(phase.id)}
          aria-disabled={unready || undefined}
          className="flex min-h-15 shrink-0 items-center justify-center gap-2 rounded-2xl border-2 px-3 font-semibold text-[18px] active:bg-(--raised-2)"
          style={{ borderColor: phase.colour }}
        >
          {state.phaseId === null ? `${phase.name} begins the night` : `${phase.name} begins now`}
        </button>
      ) : null}
      <div className={`grid min-w-0 content-start gap-2 ${grid}`}>
        {tiles.map(({ scene, tile, seen }, place) => (
          <SceneTile
            key={scene.id}
            scene={scene}
            tile={tile}
            seen={seen}
            assets={assets}
            asking={night.asking.has(scene.id)}
            unready={unready}
            digit={digits ? digitOf(place) : null}
            onPress={() => night.press(scene.id, tile)}
          />
        ))}
      </div>
      {tiles.length === 0 ? (
        <p className="py-8 text-center text-(--quiet) text-[18px]">
          No scene in {phase?.name ?? 'this show'} yet. Make one under Scenes.
        </p>
      ) : null}
    </div>
  );
};
