import { useQueryClient } from '@tanstack/react-query';
import { useEffect } from 'react';
import { Button } from '@/components/Button';
import { Problem } from '@/components/Problem';
import { DemoProgress } from '@/features/shows/DemoProgress';
import { useDemo } from '@/features/shows/useDemo';
import { queryKeys } from '@/lib/queryKeys';

/** Brings the demo night to a crew without shows. */
export const DemoOffer = () => {
  const client = useQueryClient();
  const { progress, bring } = useDemo(true);
  const state = progress.data?.state;
  useEffect(() => {
    if (state === 'ready') void client.invalidateQueries({ queryKey: queryKeys.shows });
  }, [state, client]);
  return (
    <div className="flex w-full max-w-md flex-col gap-3">
      {progress.data && state === 'working' && <DemoProgress progress={progress.data} />}
      {progress.data && state === 'failed' && <DemoProgress progress={progress.data} />}
      {state !== 'working' && (
        <Button className="self-start" disabled={bring.isPending} onClick={() => bring.mutate()}>
          Bring the demo night
        </Button>
      )}
      {bring.error && <Problem problem={bring.error} />}
    </div>
  );
};
