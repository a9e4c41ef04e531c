import { useMutation, useQueryClient } from '@tanstack/react-query';
import type { ShowDetail } from '#shared/api/shows';
import { Button } from '@/components/Button';
import { Hold } from '@/components/Hold';
import { Problem } from '@/components/Problem';
import { api } from '@/lib/api';
import { queryKeys } from '@/lib/queryKeys';

/** Opens the show for the night, or closes it by a hold. A closed show can be opened again. */
export const OpenClose = ({ show }: { show: ShowDetail }) => {
  const client = useQueryClient();
  const onSuccess = () => client.invalidateQueries({ queryKey: queryKeys.shows });
  const turn = useMutation({
    mutationFn: (act: 'open' | 'close') => api.post(`/api/shows/${show.id}/${act}`),
    onSuccess,
  });
  return (
    <>
      {turn.error && <Problem problem={turn.error} />}
      {show.mode === 'live' ? (
        <Hold label="Hold to close the show" disabled={turn.isPending} onHeld={() => turn.mutate('close')} />
      ) : (
        <Button variant="primary" disabled={turn.isPending} onClick={() => turn.mutate('open')}>
          {show.mode === 'closed' ? 'Open it again' : 'Open the show'}
        </Button>
      )}
    </>
  );
};
