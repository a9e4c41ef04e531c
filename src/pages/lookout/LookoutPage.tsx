import { useParams } from 'react-router-dom';
import { Loading } from '@/components/Loading';
import { Page } from '@/components/Page';
import { LookoutDesk } from '@/features/lookout/LookoutDesk';
import { useShowLink } from '@/hooks/useShowLink';
import { useTick } from '@/hooks/useTick';
import { showLinks } from '@/lib/showLinks';
import { useShow } from '@/lib/useShow';
import { LinkBand } from '../LinkBand';
import { ShowSkyline } from '../ShowSkyline';

/** The true state of every display, and what to do about it. */
export const LookoutPage = () => {
  const { showId = '' } = useParams();
  const show = useShow(showId);
  const { link, snapshot } = useShowLink(showId);
  useTick(500);
  const venue = show.data?.venue?.body ?? null;
  return (
    <Page light="night" title="Lookout" where={show.data?.name} links={showLinks(showId)}>
      <LinkBand snapshot={snapshot} />
      <ShowSkyline snapshot={snapshot} link={link} venue={venue} height={220} />
      <div className="mt-3">
        {snapshot.state ? (
          <LookoutDesk link={link} snapshot={snapshot} screens={venue?.screens ?? []} now={link.hubNow()} />
        ) : (
          <Loading label="Asking the hub" />
        )}
      </div>
    </Page>
  );
};
