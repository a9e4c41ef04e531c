import { useState } from 'react';
import type { Layer, Scene, SceneBody } from '#shared/scene/schema';
import { editLayer } from './bodyEdits';
import { begin, change, type History, redo, undo } from './history';

/** What is edited of a scene, and saved as one version. */
export type Draft = Pick<Scene, 'name' | 'phaseId' | 'energy' | 'body'>;

/** The part of a scene that is edited. */
export const draftOf = ({ name, phaseId, energy, body }: Scene): Draft => ({ name, phaseId, energy, body });

/** A scene being edited: undo and redo without end, and whether it differs from what is saved. */
export const useSceneEditor = (scene: Scene) => {
  const [history, setHistory] = useState<History<Draft>>(() => begin(draftOf(scene)));
  const [saved, setSaved] = useState<{ draft: Draft; version: number }>(() => ({
    draft: history.now,
    version: scene.version,
  }));
  const [chosen, setChosen] = useState<string | null>(scene.body.layers.at(-1)?.id ?? null);
  const draft = history.now;
  const edit = (next: Draft, tag: string | null) => setHistory((old) => change(old, next, tag));
  const editBody = (body: SceneBody, tag: string | null = null) => edit({ ...draft, body }, tag);
  return {
    draft,
    layer: draft.body.layers.find((layer) => layer.id === chosen) ?? null,
    chosen,
    setChosen,
    edit,
    editBody,
    editLayer: (layer: Layer, tag: string | null) =>
      editBody(
        editLayer(draft.body, layer.id, () => layer),
        tag === null ? null : `${layer.id} ${tag}`,
      ),
    undo: () => setHistory(undo),
    redo: () => setHistory(redo),
    canUndo: history.past.length > 0,
    canRedo: history.future.length > 0,
    /** Version that a save builds on. */
    version: saved.version,
    dirty: draft !== saved.draft,
    markSaved: (done: Draft, version: number) => setSaved({ draft: done, version }),
    /** Puts another state in place, as one step that can be undone, saved at a version. */
    load: (next: Scene) => {
      const fresh = draftOf(next);
      setHistory((old) => change(old, fresh, null));
      setSaved({ draft: fresh, version: next.version });
    },
  };
};

export type SceneEditor = ReturnType<typeof useSceneEditor>;
