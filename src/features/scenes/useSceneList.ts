import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { newBody } from '#shared/scene/defaults';
import type { Scene } from '#shared/scene/schema';
import { api } from '@/lib/api';
import { queryKeys } from '@/lib/queryKeys';

/** A show's scenes, and what can be done with the list. A removed scene can be put back. */
export const useSceneList = (showId: string) => {
  const client = useQueryClient();
  const [removed, setRemoved] = useState<Scene | null>(null);
  const onSuccess = () => client.invalidateQueries({ queryKey: queryKeys.show(showId) });
  return {
    scenes: useQuery({
      queryKey: queryKeys.scenes(showId),
      queryFn: () => api.get<Scene[]>(`/api/shows/${showId}/scenes`),
    }),
    removed,
    make: useMutation({
      mutationFn: (phaseId: string | null) =>
        api.post<Scene>(`/api/shows/${showId}/scenes`, {
          name: 'New scene',
          phaseId,
          energy: 5,
          body: newBody(),
        }),
      onSuccess,
    }),
    duplicate: useMutation({
      mutationFn: ({ id }: Scene) => api.post<Scene>(`/api/scenes/${id}/duplicate`),
      onSuccess,
    }),
    remove: useMutation({
      mutationFn: ({ id }: Scene) => api.delete(`/api/scenes/${id}`),
      onSuccess: async (_answer, scene) => {
        setRemoved(scene);
        await onSuccess();
      },
    }),
    restore: useMutation({
      mutationFn: ({ id }: Scene) => api.post<Scene>(`/api/scenes/${id}/restore`),
      onSuccess: async () => {
        setRemoved(null);
        await onSuccess();
      },
    }),
    move: useMutation({
      mutationFn: ({ scene, phaseId }: { scene: Scene; phaseId: string | null }) => {
        const { id, name, energy, body, version } = scene;
        return api.put<Scene>(`/api/scenes/${id}`, { name, energy, body, phaseId, expectedVersion: version });
      },
      onSuccess,
    }),
  };
};
