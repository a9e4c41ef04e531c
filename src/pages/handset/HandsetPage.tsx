import { useEffect } from 'react';
import { Link, useParams, useSearchParams } from 'react-router-dom';
import type { ShowDetail } from '#shared/api/shows';
import { Loading } from '@/components/Loading';
import { Problem } from '@/components/Problem';
import { toggleScreens } from '@/features/night/choices';
import { HandsetDesk } from '@/features/night/HandsetDesk';
import { useNight } from '@/features/night/useNight';
import { Skyline } from '@/features/skyline/Skyline';
import { screenLooks } from '@/features/skyline/screenLook';
import { useShowLink } from '@/hooks/useShowLink';
import { paths } from '@/lib/paths';
import { useShow } from '@/lib/useShow';

const Running = ({ show, room }: { show: ShowDetail; room: 'live' | 'rehearsal' }) => {
  const { link, snapshot } = useShowLink(show.id, room);
  const night = useNight(
    { id: show.id, name: show.name, phases: show.phases, groups: show.venue?.body.groups ?? [] },
    room,
    link,
    snapshot,
  );
  if (!night) return <Joining snapshot={snapshot} />;
  const ids = night.manifest.screens.map(({ id }) => id);
  return (
    <HandsetDesk
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
          maxHeight={118}
        />
      }
      leave={
        <Link
          to={room === 'rehearsal' ? paths.rehearsal(show.id) : paths.show(show.id)}
          className="flex h-15 items-center justify-center rounded-2xl bg-(--raised-2) font-semibold text-[18px]"
        >
          Leave the night
        </Link>
      }
    />
  );
};

const Joining = ({ snapshot }: { snapshot: { status: string; refusedWhy: string | null } }) =>
  snapshot.status === 'refused' ? (
    <Problem
      problem={{
        detail: snapshot.refusedWhy ?? 'The hub does not let this page in.',
        mend: 'Sign in again.',
      }}
      onRetry={() => window.location.reload()}
    />
  ) : (
    <Loading label="Joining the night" />
  );

/** The handset of one show: `?room=rehearsal` joins the rehearsal instead of the real walls. */
export const HandsetPage = () => {
  const { showId = '' } = useParams();
  const [search] = useSearchParams();
  const show = useShow(showId);
  useEffect(() => {
    document.documentElement.dataset.light = 'night';
    document.title = `${show.data?.name ?? 'Handset'} · Lampyrid`;
  }, [show.data?.name]);
  if (show.data)
    return <Running show={show.data} room={search.get('room') === 'rehearsal' ? 'rehearsal' : 'live'} />;
  if (show.error) return <Problem problem={show.error} onRetry={() => void show.refetch()} />;
  return <Loading label="The night" />;
};
