import { Link, useParams } from 'react-router-dom';
import { Empty } from '@/components/Empty';
import { Loading } from '@/components/Loading';
import { Page } from '@/components/Page';
import { RehearsalRoom } from '@/features/rehearsal/RehearsalRoom';
import { useShowLink } from '@/hooks/useShowLink';
import { paths } from '@/lib/paths';
import { showLinks } from '@/lib/showLinks';
import { useShow } from '@/lib/useShow';
import { LinkBand } from '../LinkBand';

/** The night in a drawn room: nothing here reaches a real display. */
export const RehearsalPage = () => {
  const { showId = '' } = useParams();
  const show = useShow(showId);
  const { link, snapshot } = useShowLink(showId, 'rehearsal');
  const screens = show.data?.venue?.body.screens;
  return (
    <Page
      light="night"
      striped
      title="Rehearsal"
      where={show.data ? `${show.data.name} · rehearsal, nothing goes to the real screens` : undefined}
      links={showLinks(showId)}
    >
      <LinkBand snapshot={snapshot} />
      <div className="grid grid-cols-[minmax(0,1fr)] gap-4 lg:grid-cols-[minmax(0,1fr)_18rem]">
        {!screens && <Loading label="The room" />}
        {screens && screens.length === 0 && (
          <Empty title="This venue has no screens yet">
            Measure them on the plan page; then the room can be drawn.
          </Empty>
        )}
        {screens && screens.length > 0 && <RehearsalRoom link={link} screens={screens} />}
        <aside className="flex flex-col gap-3 rounded-xl bg-(--raised) p-4">
          <h2 className="text-lg font-bold">Your phone</h2>
          <p className="text-(--quiet)">
            The handset joined to this room fires at the drawn screens only. It wears the same stripes.
          </p>
          <Link
            to={paths.handset(showId, 'rehearsal')}
            target="_blank"
            className="grid min-h-15 place-items-center rounded-lg bg-(--firefly) px-4 font-bold text-(--on-firefly)"
          >
            Open the rehearsal handset
          </Link>
          <p className="text-sm text-(--quiet)">
            On a phone, open <span className="font-mono break-all">{paths.handset(showId, 'rehearsal')}</span>{' '}
            on this address.
          </p>
        </aside>
      </div>
    </Page>
  );
};
