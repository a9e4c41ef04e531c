import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';
import type { Asset } from '#shared/api/assets';
import type { Phase } from '#shared/api/shows';
import type { Scene } from '#shared/scene/schema';
import { Button } from '@/components/Button';
import { paths } from '@/lib/paths';
import { sourceWords } from './layerWords';

interface Props {
  scene: Scene;
  phases: readonly Phase[];
  assets: ReadonlyMap<string, Asset>;
  /** A still likeness of the scene. */
  sketch: ReactNode;
  mayEdit: boolean;
  busy: boolean;
  onDuplicate: () => void;
  onRemove: () => void;
  onPhase: (phaseId: string | null) => void;
}

/** One scene in the list: what it looks like, what it is made of, what can be done with it. */
export const SceneRow = (props: Props) => {
  const { scene, phases, assets, sketch, mayEdit, busy, onDuplicate, onRemove, onPhase } = props;
  const layers = [...scene.body.layers].reverse().filter((layer) => layer.on);
  return (
    <li className="grid grid-cols-[7rem_minmax(0,1fr)] items-center gap-x-4 gap-y-2 rounded-2xl bg-(--raised) p-3 md:grid-cols-[9rem_minmax(0,1fr)_auto]">
      <Link
        to={paths.scene(scene.showId, scene.id)}
        className="relative block aspect-video overflow-hidden rounded-xl bg-black"
        tabIndex={-1}
        aria-hidden="true"
      >
        {sketch}
      </Link>
      <div className="min-w-0">
        <Link
          to={paths.scene(scene.showId, scene.id)}
          className="flex min-h-11 items-center gap-3 text-lg font-bold"
        >
          <span className="min-w-0 break-words">{scene.name}</span>
          <span className="shrink-0 font-mono text-sm font-normal text-(--quiet)">energy {scene.energy}</span>
        </Link>
        <p className="line-clamp-2 text-sm text-(--quiet)">
          {layers.length === 0
            ? 'nothing in it yet'
            : layers.map((layer) => sourceWords(layer.source, assets)).join(' over ')}
        </p>
      </div>
      {mayEdit && (
        <div className="col-span-2 flex flex-wrap items-center gap-2 md:col-span-1">
          <label className="sr-only" htmlFor={`phase-${scene.id}`}>
            Phase of {scene.name}
          </label>
          <select
            id={`phase-${scene.id}`}
            value={scene.phaseId ?? ''}
            disabled={busy}
            onChange={(event) => onPhase(event.target.value || null)}
            className="h-11 rounded-lg bg-(--raised-2) px-3"
          >
            <option value="">no phase</option>
            {phases.map((phase) => (
              <option key={phase.id} value={phase.id}>
                {phase.name}
              </option>
            ))}
          </select>
          <Button disabled={busy} onClick={onDuplicate} aria-label={`Copy ${scene.name}`}>
            Copy
          </Button>
          <Button disabled={busy} onClick={onRemove} aria-label={`Remove ${scene.name}`}>
            Remove
          </Button>
        </div>
      )}
    </li>
  );
};
