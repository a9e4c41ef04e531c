import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import type { Crew } from '#shared/api/accounts';
import type { Role } from '#shared/show/roles';
import { api } from '@/lib/api';
import { queryKeys } from '@/lib/queryKeys';

/** The crew and what can be done to it; each act brings the list up to date. */
export const useCrew = () => {
  const client = useQueryClient();
  const onSuccess = async () => {
    await client.invalidateQueries({ queryKey: queryKeys.crew });
    await client.invalidateQueries({ queryKey: queryKeys.session });
  };
  return {
    crew: useQuery({ queryKey: queryKeys.crew, queryFn: () => api.get<Crew>('/api/crew') }),
    invite: useMutation({
      mutationFn: (body: { email: string; role: Role }) => api.post('/api/invitations', body),
      onSuccess,
    }),
    revoke: useMutation({ mutationFn: (id: string) => api.delete(`/api/invitations/${id}`), onSuccess }),
    changeRole: useMutation({
      mutationFn: ({ id, role }: { id: string; role: Role }) => api.patch(`/api/members/${id}`, { role }),
      onSuccess,
    }),
    remove: useMutation({ mutationFn: (id: string) => api.delete(`/api/members/${id}`), onSuccess }),
  };
};
