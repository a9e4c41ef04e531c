import { useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import { useNavigate, useParams } from 'react-router-dom';
import type { Asset } from '#shared/api/assets';
import type { Phase } from '#shared/api/shows';
import type { Scene } from '#shared/scene/schema';
import { may } from '#shared/show/roles';
import { Button } from '@/components/Button';
import { Empty } from '@/components/Empty';
import { Loading } from '@/components/Loading';
import { Page } from '@/components/Page';
import { Problem } from '@/components/Problem';
import { SceneSketch } from '@/features/night/SceneSketch';
import { drawable } from '@/features/scenes/drawable';
import { SceneRow } from '@/features/scenes/SceneRow';
import { useSceneList } from '@/features/scenes/useSceneList';
import { api } from '@/lib/api';
import { paths } from '@/lib/paths';
import { queryKeys } from '@/lib/queryKeys';
import { showLinks } from '@/lib/showLinks';
import { useSession } from '@/lib/useSession';
import { useShow } from '@/lib/useShow';
import { count } from '@/lib/words';

interface Part {
  phase: Phase | null;
  scenes: Scene[];
}

/** Scenes by phase, in the order of the night; those without a phase last. */
const partsOf = (phases: readonly Phase[], scenes: readonly Scene[]): Part[] => {
  const known = new Set(phases.map(({ id }) => id));
  const parts: Part[] = phases.map((phase) => ({
    phase,
    scenes: scenes.filter(({ phaseId }) => phaseId === phase.id),
  }));
  const loose = scenes.filter(({ phaseId }) => !phaseId || !known.has(phaseId));
  return loose.length > 0 ? [...parts, { phase: null, scenes: loose }] : parts;
};

/** All scenes of a show, phase by phase. */
export const ScenesPage = () => {
  const { showId = '' } = useParams();
  const go = useNavigate();
  const show = useShow(showId);
  const session = useSession();
  const list = useSceneList(showId);
  const assets = useQuery({ queryKey: queryKeys.assets, queryFn: () => api.get<Asset[]>('/api/assets') });
  const byId = useMemo(() => new Map((assets.data ?? []).map((asset) => [asset.id, asset])), [assets.data]);
  const files = useMemo(
    () => new Map(drawable(assets.data ?? []).map((file) => [file.id, file])),
    [assets.data],
  );
  const mayEdit = session.user !== null && may(session.user.role, 'scene.edit');
  const busy = list.move.isPending || list.duplicate.isPending || list.remove.isPending;
  const fault =
    list.make.error ?? list.duplicate.error ?? list.remove.error ?? list.restore.error ?? list.move.error;
  const make = (phaseId: string | null) =>
    list.make.mutate(phaseId, { onSuccess: (scene) => void go(paths.scene(showId, scene.id)) });
  const scenes = list.scenes.data;
  return (
    <Page light="night" title="Scenes" where={show.data?.name} links={showLinks(showId)}>
      {(show.isPending || list.scenes.isPending) && <Loading label="Scenes" />}
      {show.error && <Problem problem={show.error} onRetry={() => void show.refetch()} />}
      {list.scenes.error && (
        <Problem problem={list.scenes.error} onRetry={() => void list.scenes.refetch()} />
      )}
      {fault && <Problem problem={fault} />}
      {list.removed && (
        <p role="status" className="mb-4 flex flex-wrap items-center gap-3 rounded-xl bg-(--raised-2) p-3">
          “{list.removed.name}” is removed.
          <Button onClick={() => list.removed && list.restore.mutate(list.removed)}>Put it back</Button>
        </p>
      )}
      {scenes && show.data && (
        <>
          <div className="mb-4 flex flex-wrap items-center justify-between gap-3">
            <p className="text-(--quiet)">
              {scenes.length === 0
                ? 'No scenes yet'
                : `${count(scenes.length, 'scene')}, in the order of the night`}
            </p>
            {mayEdit && (
              <Button variant="primary" disabled={list.make.isPending} onClick={() => make(null)}>
                New scene
              </Button>
            )}
          </div>
          {scenes.length === 0 && (
            <Empty title="What will the walls show?">
              A scene is what a screen shows: drawings, clips, stills, the client’s mark and words, one over
              the other.
              {mayEdit ? ' Make the first; a drawing needs no file at all.' : ' A lead or VJ makes them.'}
            </Empty>
          )}
          {partsOf(show.data.phases, scenes).map(({ phase, scenes: some }) => (
            <section
              key={phase?.id ?? 'loose'}
              className="mb-6"
              aria-label={phase?.name ?? 'Without a phase'}
            >
              <div className="mb-2 flex items-center gap-3">
                <span
                  aria-hidden="true"
                  className="h-6 w-1.5 rounded-full bg-(--line)"
                  style={phase ? { background: phase.colour } : undefined}
                />
                <h2 className="text-lg font-bold">{phase?.name ?? 'Without a phase'}</h2>
                {phase && <span className="font-mono text-sm text-(--quiet)">{phase.startsAt}</span>}
                {mayEdit && phase && (
                  <Button
                    className="ml-auto"
                    disabled={list.make.isPending}
                    aria-label={`New scene in ${phase.name}`}
                    onClick={() => make(phase.id)}
                  >
                    Add
                  </Button>
                )}
              </div>
              {some.length === 0 ? (
                <p className="text-sm text-(--quiet)">Nothing for this part of the night.</p>
              ) : (
                <ul className="grid gap-2">
                  {some.map((scene) => (
                    <SceneRow
                      key={scene.id}
                      scene={scene}
                      phases={show.data.phases}
                      assets={byId}
                      sketch={<SceneSketch scene={scene} assets={files} />}
                      mayEdit={mayEdit}
                      busy={busy}
                      onDuplicate={() => list.duplicate.mutate(scene)}
                      onRemove={() => list.remove.mutate(scene)}
                      onPhase={(phaseId) => list.move.mutate({ scene, phaseId })}
                    />
                  ))}
                </ul>
              )}
            </section>
          ))}
        </>
      )}
    </Page>
  );
};
