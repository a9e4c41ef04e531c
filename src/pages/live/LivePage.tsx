import { useParams } from 'react-router-dom';
import type { ShowDetail } from '#shared/api/shows';
import { Loading } from '@/components/Loading';
import { Page } from '@/components/Page';
import { Problem } from '@/components/Problem';
import { toggleScreens } from '@/features/night/choices';
import { LiveDesk } from '@/features/night/LiveDesk';
import { useNight } from '@/features/night/useNight';
import { Skyline } from '@/features/skyline/Skyline';
import { screenLooks } from '@/features/skyline/screenLook';
import { useShowLink } from '@/hooks/useShowLink';
import { showLinks } from '@/lib/showLinks';
import { useShow } from '@/lib/useShow';

const Running = ({ show }: { show: ShowDetail }) => {
  const { link, snapshot } = useShowLink(show.id, 'live');
  const night = useNight(
    { id: show.id, name: show.name, phases: show.phases, groups: show.venue?.body.groups ?? [] },
    'live',
    link,
    snapshot,
  );
  if (!night)
    return snapshot.status === 'refused' ? (
      <Problem problem={{ detail: snapshot.refusedWhy ?? 'The hub does not let this page in.' }} />
    ) : (
      <Loading label="Joining the night" />
    );
  const ids = night.manifest.screens.map(({ id }) => id);
  return (
    <LiveDesk
      night={night}
      skyline={
        <Skyline
          screens={night.manifest.screens}
          looks={screenLooks(snapshot, ids, night.now)}
          chosen={night.chosen}
          onToggle={(id) =>
            night.setChoices({
              ...night.choices,
              screenIds: toggleScreens(night.choices.screenIds, [id], ids),
            })
          }
          maxHeight={170}
          fontPx={16}
        />
      }
    />
  );
};

/** Live: the night on a laptop, with keys. */
export const LivePage = () => {
  const { showId = '' } = useParams();
  const show = useShow(showId);
  return (
    <Page light="night" title="Live" where={show.data?.name} links={showLinks(showId)}>
      {show.data ? <Running show={show.data} /> : null}
      {show.error && !show.data ? <Problem problem={show.error} onRetry={() => void show.refetch()} /> : null}
      {show.isPending ? <Loading label="The night" /> : null}
    </Page>
  );
};
