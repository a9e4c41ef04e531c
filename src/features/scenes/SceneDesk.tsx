import { type KeyboardEvent, useEffect, useState } from 'react';
import { useBlocker, useNavigate } from 'react-router-dom';
import type { Asset } from '#shared/api/assets';
import type { ShowDetail } from '#shared/api/shows';
import type { Scene } from '#shared/scene/schema';
import { Button } from '@/components/Button';
import { Dialog } from '@/components/Dialog';
import { Problem } from '@/components/Problem';
import { paths } from '@/lib/paths';
import { AddLayer } from './AddLayer';
import { most } from './bodyEdits';
import { Conflict } from './Conflict';
import { DialRows } from './DialRows';
import { LayerList } from './LayerList';
import { LayerPanel } from './LayerPanel';
import { LivePicture } from './LivePicture';
import { lackOf } from './lack';
import { SceneFields } from './SceneFields';
import { useSaveScene } from './useSaveScene';
import { useSceneEditor } from './useSceneEditor';
import { Versions } from './Versions';

interface Props {
  scene: Scene;
  show: ShowDetail;
  assets: readonly Asset[];
  mayEdit: boolean;
}

/** In text, the browser undoes the typing itself. */
const isTyping = (target: EventTarget): boolean =>
  target instanceof HTMLInputElement && !['range', 'color', 'checkbox'].includes(target.type);

/** Says so before unsaved work is left, in the program and when the tab closes. */
const useLeaveWarning = (dirty: boolean) => {
  const blocker = useBlocker(dirty);
  useEffect(() => {
    if (!dirty) return;
    const warn = (event: BeforeUnloadEvent) => event.preventDefault();
    window.addEventListener('beforeunload', warn);
    return () => window.removeEventListener('beforeunload', warn);
  }, [dirty]);
  return blocker;
};

/** A scene under the hand: live picture, layers, dials, versions. */
export const SceneDesk = ({ scene, show, assets, mayEdit }: Props) => {
  const editor = useSceneEditor(scene);
  const saving = useSaveScene(scene, editor);
  const go = useNavigate();
  const [adding, setAdding] = useState(false);
  const blocker = useLeaveWarning(editor.dirty && mayEdit);
  const { draft } = editor;
  const byId = new Map(assets.map((asset) => [asset.id, asset]));
  const lack = lackOf(draft);
  const busy = saving.save.isPending || saving.theirs.isPending || saving.copy.isPending;
  const save = () => {
    if (mayEdit && editor.dirty && !lack && !busy) saving.save.mutate(draft);
  };
  const keys = (event: KeyboardEvent) => {
    if (!(event.ctrlKey || event.metaKey)) return;
    const key = event.key.toLowerCase();
    if (key === 's') {
      event.preventDefault();
      save();
    }
    if (key !== 'z' || isTyping(event.target)) return;
    event.preventDefault();
    if (event.shiftKey) editor.redo();
    else editor.undo();
  };
  return (
    // biome-ignore lint/a11y/noStaticElementInteractions: only catches keys that bubble from the parts inside
    <div className="grid min-w-0 gap-4 lg:grid-cols-[minmax(0,1fr)_27rem]" onKeyDown={keys}>
      <div className="flex min-w-0 flex-col gap-4">
        <div className="flex flex-wrap items-center gap-2">
          <h2 className="mr-auto min-w-0 truncate text-2xl font-bold">
            {draft.name || 'A scene without a name'}
          </h2>
          {mayEdit && (
            <>
              <Button onClick={editor.undo} disabled={!editor.canUndo} title="Ctrl+Z">
                Undo
              </Button>
              <Button onClick={editor.redo} disabled={!editor.canRedo} title="Ctrl+Shift+Z">
                Redo
              </Button>
              <Button
                variant="primary"
                title="Ctrl+S"
                disabled={!editor.dirty || lack !== null || busy}
                onClick={save}
              >
                {saving.save.isPending ? 'Saving' : editor.dirty ? 'Save version' : 'Saved'}
              </Button>
            </>
          )}
        </div>
        {lack && mayEdit && <p className="text-(--amber)">▲ {lack}</p>}
        {saving.conflict && (
          <Conflict
            detail={saving.conflict.detail}
            busy={busy}
            onTheirs={() => saving.theirs.mutate()}
            onCopy={() =>
              saving.copy.mutate(draft, {
                onSuccess: (made) => void go(paths.scene(made.showId, made.id)),
              })
            }
          />
        )}
        {saving.save.error && !saving.conflict && <Problem problem={saving.save.error} onRetry={save} />}
        {saving.theirs.error && <Problem problem={saving.theirs.error} />}
        {saving.copy.error && <Problem problem={saving.copy.error} />}
        {saving.take.error && <Problem problem={saving.take.error} />}
        <LivePicture body={draft.body} assets={assets} screens={show.venue?.body.screens ?? []} />
        {mayEdit && (
          <>
            <SceneFields draft={draft} phases={show.phases} onDraft={editor.edit} />
            <DialRows body={draft.body} onBody={editor.editBody} />
          </>
        )}
      </div>
      <aside className="flex min-w-0 flex-col gap-3">
        <div className="flex items-center justify-between gap-3">
          <h2 className="font-bold">Layers, front to back</h2>
          {mayEdit && (
            <Button disabled={draft.body.layers.length >= most.layers} onClick={() => setAdding(true)}>
              Add
            </Button>
          )}
        </div>
        {draft.body.layers.length === 0 && (
          <p className="rounded-xl border border-dashed border-(--line) p-4 text-(--quiet)">
            Nothing yet. A drawing is the quickest start: it needs no file.
          </p>
        )}
        <LayerList
          body={draft.body}
          assets={byId}
          chosen={editor.chosen}
          onChoose={editor.setChosen}
          onBody={mayEdit ? (body) => editor.editBody(body) : null}
        />
        {editor.layer && mayEdit && (
          <LayerPanel
            key={editor.layer.id}
            layer={editor.layer}
            dials={draft.body.dials}
            assets={assets}
            onLayer={editor.editLayer}
            onRemove={() =>
              editor.editBody({
                ...draft.body,
                layers: draft.body.layers.filter(({ id }) => id !== editor.chosen),
              })
            }
          />
        )}
        <section className="rounded-2xl bg-(--raised) p-4">
          <h2 className="mb-2 font-bold">Versions</h2>
          <Versions
            sceneId={scene.id}
            current={editor.version}
            onTake={mayEdit ? (version) => saving.take.mutate(version) : null}
          />
        </section>
      </aside>
      <AddLayer
        open={adding}
        onClose={() => setAdding(false)}
        onAdd={(layer) => {
          editor.editBody({ ...draft.body, layers: [...draft.body.layers, layer] });
          editor.setChosen(layer.id);
          setAdding(false);
        }}
      />
      <Dialog
        title="Leave without saving?"
        open={blocker.state === 'blocked'}
        onClose={() => blocker.state === 'blocked' && blocker.reset()}
      >
        <p className="mb-4">What you changed since version {editor.version} would be lost.</p>
        <div className="flex flex-wrap gap-3">
          <Button variant="primary" onClick={() => blocker.state === 'blocked' && blocker.reset()}>
            Stay
          </Button>
          <Button variant="danger" onClick={() => blocker.state === 'blocked' && blocker.proceed()}>
            Leave
          </Button>
        </div>
      </Dialog>
    </div>
  );
};
