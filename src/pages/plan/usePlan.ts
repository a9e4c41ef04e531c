import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import type { Crew } from '#shared/api/accounts';
import type { Display } from '#shared/api/displays';
import type { Scene } from '#shared/scene/schema';
import type { ShowValues } from '@/features/shows/ShowForm';
import { api } from '@/lib/api';
import { queryKeys } from '@/lib/queryKeys';
import { useShow } from '@/lib/useShow';

/** All that the plan of a show is made of. */
export const usePlan = (showId: string) => {
  const client = useQueryClient();
  const scenes = useQuery({
    queryKey: queryKeys.scenes(showId),
    queryFn: () => api.get<Scene[]>(`/api/shows/${showId}/scenes`),
  });
  const byPhase: Record<string, number> = {};
  for (const scene of scenes.data ?? [])
    if (scene.phaseId) byPhase[scene.phaseId] = (byPhase[scene.phaseId] ?? 0) + 1;
  return {
    show: useShow(showId),
    scenes,
    byPhase,
    displays: useQuery({
      queryKey: queryKeys.displays(showId),
      queryFn: () => api.get<Display[]>(`/api/shows/${showId}/displays`),
    }),
    crew: useQuery({ queryKey: queryKeys.crew, queryFn: () => api.get<Crew>('/api/crew') }),
    edit: useMutation({
      mutationFn: (body: ShowValues) => api.patch(`/api/shows/${showId}`, body),
      onSuccess: () => client.invalidateQueries({ queryKey: queryKeys.shows }),
    }),
  };
};
