import { useMutation, useQueryClient } from '@tanstack/react-query';
import { type KeyboardEvent, useState } from 'react';
import type { Display, MapVersion } from '#shared/api/displays';
import type { OutputMap } from '#shared/mapping/schema';
import type { Screen } from '#shared/venue/schema';
import { Problem } from '@/components/Problem';
import { api } from '@/lib/api';
import { queryKeys } from '@/lib/queryKeys';
import type { LinkSnapshot, ShowLink } from '@/link/types';
import { DisplayTools } from './DisplayTools';
import { EditorBar } from './EditorBar';
import { MapCanvas } from './MapCanvas';
import { NudgePad } from './NudgePad';
import { RegionPanel } from './RegionPanel';
import { newRegion } from './regionEdits';
import { useMapEditor } from './useMapEditor';
import { VersionList } from './VersionList';

interface Props {
  display: Display;
  screens: readonly Screen[];
  link: ShowLink | null;
  snapshot: LinkSnapshot;
}

/** A short id for a new region, unlike any in the map. */
const regionId = (map: OutputMap): string => {
  let n = map.regions.length + 1;
  while (map.regions.some((region) => region.id === `r${n}`)) n += 1;
  return `r${n}`;
};

/** The output map of one display: picture, corners, region, versions. */
export const OutputsDesk = ({ display, screens, link, snapshot }: Props) => {
  const client = useQueryClient();
  const editor = useMapEditor(display.id, display.map, link, snapshot.status === 'on');
  const [said, setSaid] = useState<string | null>(null);
  const region = editor.map.regions.find((one) => one.id === editor.choice?.regionId);
  const lineUp = snapshot.state?.lineUp.includes(display.id) ?? false;

  const save = useMutation({
    mutationFn: ({ map, note }: { map: OutputMap; note: string }) =>
      api.post<MapVersion>(`/api/displays/${display.id}/maps`, { map, note }),
    onSuccess: async (_version, { map }) => {
      editor.markSaved(map);
      await client.invalidateQueries({ queryKey: queryKeys.maps(display.id) });
      await client.invalidateQueries({ queryKey: queryKeys.displays(display.showId) });
    },
  });
  const ask = async (body: Parameters<ShowLink['send']>[0]) => {
    const answer = link
      ? await link.send(body)
      : { outcome: 'not-sent' as const, words: 'No link, not sent' };
    setSaid(answer.outcome === 'taken' ? null : answer.words);
  };
  const keys = (event: KeyboardEvent) => {
    if (!(event.ctrlKey || event.metaKey) || event.key.toLowerCase() !== 'z') return;
    if (event.target instanceof HTMLInputElement) return;
    event.preventDefault();
    if (event.shiftKey) editor.redo();
    else editor.undo();
  };

  return (
    // biome-ignore lint/a11y/noStaticElementInteractions: only catches undo keys that bubble from the parts inside
    <div className="grid min-w-0 gap-3 lg:grid-cols-[minmax(0,1fr)_20rem]" onKeyDown={keys}>
      <div className="min-w-0 rounded-xl bg-(--raised)">
        <EditorBar
          display={display}
          editor={editor}
          screens={screens}
          lineUp={lineUp}
          saving={save.isPending}
          onAdd={(screen) => {
            const made = newRegion(regionId(editor.map), screen, editor.map.raster);
            editor.edit((map) => ({ ...map, regions: [...map.regions, made] }));
            editor.setChoice({ regionId: made.id, corner: 0 });
          }}
          onLineUp={(on) => void ask({ kind: 'lineup.set', displayId: display.id, on })}
          onIdentify={() => void ask({ kind: 'display.identify', displayId: display.id })}
          onSave={(note) => save.mutate({ map: editor.map, note })}
        />
        <div className="h-[44vh] min-h-64 lg:h-[52vh]">
          <MapCanvas
            map={editor.map}
            choice={editor.choice}
            onChoose={editor.setChoice}
            onDragCorner={editor.dragCorner}
            onDragRegion={editor.dragRegion}
            onNudge={editor.nudge}
          />
        </div>
        <p className="p-3 text-sm text-(--quiet)" aria-live="polite">
          {said ??
            editor.refusal ??
            'Drag a corner, or move it with the arrow keys: 1 px · with Shift 10 px · with Alt 0.1 px.'}
        </p>
        {save.error && <Problem problem={save.error} onRetry={() => save.reset()} />}
      </div>
      <aside className="flex min-w-0 flex-col gap-3">
        <div className="rounded-xl bg-(--raised) p-4">
          <NudgePad disabled={!editor.choice} onNudge={editor.nudge} />
          {region ? (
            <RegionPanel
              region={region}
              screen={screens.find((screen) => screen.id === region.screenId)}
              raster={editor.map.raster}
              corner={editor.choice?.corner ?? null}
              onEdit={(make, grip) =>
                editor.editRegion(region.id, make, grip ? `${region.id} ${grip}` : null)
              }
              onRemove={() => {
                editor.edit((map) => ({
                  ...map,
                  regions: map.regions.filter((one) => one.id !== region.id),
                }));
                editor.setChoice(null);
              }}
            />
          ) : (
            <p className="mt-4 text-sm text-(--quiet)">Choose a region to see its corners.</p>
          )}
        </div>
        <div className="rounded-xl bg-(--raised) p-4">
          <h2 className="mb-2 font-bold">Versions</h2>
          <VersionList
            displayId={display.id}
            onGoBack={(version) => {
              editor.edit(() => version.map);
              save.mutate({ map: version.map, note: `back to version ${version.version}` });
            }}
          />
        </div>
        <DisplayTools
          display={display}
          onReload={() => void ask({ kind: 'display.reload', displayId: display.id })}
        />
      </aside>
    </div>
  );
};
