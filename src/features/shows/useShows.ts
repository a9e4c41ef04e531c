import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import type { Show } from '#shared/api/shows';
import { api } from '@/lib/api';
import { queryKeys } from '@/lib/queryKeys';
import type { ShowValues } from './ShowForm';

/** The crew's shows and what can be done with them. */
export const useShows = () => {
  const client = useQueryClient();
  const onSuccess = () => client.invalidateQueries({ queryKey: queryKeys.shows });
  return {
    shows: useQuery({ queryKey: queryKeys.shows, queryFn: () => api.get<Show[]>('/api/shows') }),
    make: useMutation({ mutationFn: (body: ShowValues) => api.post<Show>('/api/shows', body), onSuccess }),
    clone: useMutation({
      mutationFn: ({ id, ...body }: { id: string; name: string; date: string }) =>
        api.post<Show>(`/api/shows/${id}/clone`, body),
      onSuccess,
    }),
    remove: useMutation({ mutationFn: (id: string) => api.delete(`/api/shows/${id}`), onSuccess }),
  };
};
