import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import type { SignInRecord } from '#shared/api/accounts';
import { Button } from '@/components/Button';
import { Loading } from '@/components/Loading';
import { Problem } from '@/components/Problem';
import { StateTag } from '@/components/StateTag';
import { api } from '@/lib/api';
import { queryKeys } from '@/lib/queryKeys';
import { momentWords } from '@/lib/words';

/** Where one is signed in, and a way to end each. */
export const MySignIns = () => {
  const client = useQueryClient();
  const list = useQuery({
    queryKey: queryKeys.sessions,
    queryFn: () => api.get<SignInRecord[]>('/api/sessions'),
  });
  const end = useMutation({
    mutationFn: (id: string) => api.delete(`/api/sessions/${id}`),
    onSuccess: () => client.invalidateQueries({ queryKey: queryKeys.sessions }),
  });
  if (list.isPending) return <Loading label="Sign-ins" />;
  if (list.error) return <Problem problem={list.error} onRetry={() => void list.refetch()} />;
  return (
    <ul className="divide-y divide-(--line)">
      {list.data.map((one) => (
        <li key={one.id} className="flex flex-wrap items-center gap-3 py-2">
          <p className="min-w-0 flex-1">
            {one.device} <span className="text-(--quiet)">since {momentWords(one.since)}</span>
          </p>
          {one.current ? (
            <StateTag state="on">this one</StateTag>
          ) : (
            <Button onClick={() => end.mutate(one.id)}>End it</Button>
          )}
        </li>
      ))}
      {end.error && <Problem problem={end.error} />}
    </ul>
  );
};
