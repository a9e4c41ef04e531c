import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import type { DemoProgress } from '#shared/api/demo';
import { api } from '@/lib/api';
import { queryKeys } from '@/lib/queryKeys';

/** Time between looks at the demo night's progress, ms. */
const lookMs = 800;

/** The demo night: how far it is, and a way to bring it. Looks again and again while it is being made. */
export const useDemo = (on: boolean) => {
  const client = useQueryClient();
  const progress = useQuery({
    queryKey: queryKeys.demo,
    queryFn: () => api.get<DemoProgress>('/api/demo'),
    enabled: on,
    refetchInterval: (query) => {
      const state = query.state.data?.state;
      return state === 'ready' || state === 'failed' ? false : lookMs;
    },
  });
  const bring = useMutation({
    mutationFn: () => api.post<DemoProgress>('/api/demo'),
    onSuccess: (data) => client.setQueryData(queryKeys.demo, data),
  });
  return { progress, bring };
};
