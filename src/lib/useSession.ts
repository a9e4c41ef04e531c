import { useQuery } from '@tanstack/react-query';
import type { Session } from '#shared/api/accounts';
import { type Action, may } from '#shared/show/roles';
import { api } from './api';
import { queryKeys } from './queryKeys';

/** Who is signed in, and what they may do. */
export const useSession = () => {
  const session = useQuery({
    queryKey: queryKeys.session,
    queryFn: () => api.get<Session>('/api/session'),
    staleTime: 60_000,
  });
  const role = session.data?.user?.role ?? 'anyone';
  return { ...session, user: session.data?.user ?? null, role, may: (action: Action) => may(role, action) };
};
