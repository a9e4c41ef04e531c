import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { useParams } from 'react-router-dom';
import type { Display } from '#shared/api/displays';
import { Empty } from '@/components/Empty';
import { Loading } from '@/components/Loading';
import { Page } from '@/components/Page';
import { Problem } from '@/components/Problem';
import { DisplayList } from '@/features/outputs/DisplayList';
import { JoinDisplay } from '@/features/outputs/JoinDisplay';
import { OutputsDesk } from '@/features/outputs/OutputsDesk';
import { useShowLink } from '@/hooks/useShowLink';
import { api } from '@/lib/api';
import { queryKeys } from '@/lib/queryKeys';
import { showLinks } from '@/lib/showLinks';
import { useShow } from '@/lib/useShow';
import { ShowSkyline } from '../ShowSkyline';

/** Join displays and bend each picture onto its wall. */
export const OutputsPage = () => {
  const { showId = '' } = useParams();
  const show = useShow(showId);
  const { link, snapshot } = useShowLink(showId);
  const displays = useQuery({
    queryKey: [...queryKeys.displays(showId), snapshot.displays.length],
    queryFn: () => api.get<Display[]>(`/api/shows/${showId}/displays`),
  });
  const [chosen, setChosen] = useState<string | null>(null);
  const display = displays.data?.find((one) => one.id === chosen) ?? displays.data?.[0];
  const screens = show.data?.venue?.body.screens ?? [];
  return (
    <Page light="night" title="Outputs" where={show.data?.name} links={showLinks(showId)}>
      <ShowSkyline snapshot={snapshot} link={link} venue={show.data?.venue?.body ?? null} height={150} />
      <div className="mt-3 grid gap-3 lg:grid-cols-[17rem_minmax(0,1fr)]">
        <aside className="flex min-w-0 flex-col gap-3">
          <h2 className="font-bold">Displays</h2>
          {displays.isPending && <Loading label="Displays" />}
          {displays.error && <Problem problem={displays.error} onRetry={() => void displays.refetch()} />}
          <DisplayList
            displays={displays.data ?? []}
            statuses={snapshot.displays}
            chosen={display?.id ?? null}
            onChoose={setChosen}
          />
          <JoinDisplay showId={showId} nextName={`Display ${(displays.data?.length ?? 0) + 1}`} />
          <p className="rounded-xl bg-[#221a0b] p-4 text-sm">
            <strong className="block text-(--amber)">Keep exit signs free</strong>
            Never project over an exit sign or its light, nor into eyes at the booth or on stairs. The venue
            has the last word.
          </p>
        </aside>
        {display ? (
          <OutputsDesk key={display.id} display={display} screens={screens} link={link} snapshot={snapshot} />
        ) : (
          displays.data && (
            <Empty title="No display yet">
              Open /display on the machine behind a projector or panel. It shows a code of a word and four
              digits: type it on the left.
            </Empty>
          )
        )}
      </div>
    </Page>
  );
};
