import { useMutation, useQueryClient } from '@tanstack/react-query';
import type { Scene } from '#shared/scene/schema';
import { api, ProblemError } from '@/lib/api';
import { queryKeys } from '@/lib/queryKeys';
import type { Draft, SceneEditor } from './useSceneEditor';

const ending = ' (copy)';
/** A name for the copy that still says so when the name is as long as names may be (60). */
const copyName = (name: string): string => `${name.slice(0, 60 - ending.length)}${ending}`;

/** Saving, taking what another saved, going back to a version, and saving as a copy. */
export const useSaveScene = (scene: Scene, editor: SceneEditor) => {
  const client = useQueryClient();
  const fresh = async () => {
    await client.invalidateQueries({ queryKey: queryKeys.scenes(scene.showId) });
    await client.invalidateQueries({ queryKey: queryKeys.sceneVersions(scene.id) });
  };
  const save = useMutation({
    mutationFn: (draft: Draft) =>
      api.put<Scene>(`/api/scenes/${scene.id}`, { ...draft, expectedVersion: editor.version }),
    onSuccess: async (saved, draft) => {
      editor.markSaved(draft, saved.version);
      client.setQueryData(queryKeys.scene(scene.id), saved);
      await fresh();
    },
  });
  const theirs = useMutation({
    mutationFn: () => api.get<Scene>(`/api/scenes/${scene.id}`),
    onSuccess: (next) => {
      editor.load(next);
      save.reset();
    },
  });
  const copy = useMutation({
    mutationFn: (draft: Draft) =>
      api.post<Scene>(`/api/shows/${scene.showId}/scenes`, {
        ...draft,
        name: copyName(draft.name),
      }),
    onSuccess: async (_made, draft) => {
      editor.markSaved(draft, editor.version);
      save.reset();
      await fresh();
    },
  });
  const take = useMutation({
    mutationFn: (version: number) => api.get<Scene>(`/api/scenes/${scene.id}/versions/${version}`),
    onSuccess: (old) => editor.editBody(old.body),
  });
  const conflict = save.error instanceof ProblemError && save.error.status === 409 ? save.error : null;
  return { save, theirs, copy, take, conflict };
};
