import { useState } from 'react';
import { useNavigate } from 'react-router-dom';
import type { Show } from '#shared/api/shows';
import { Button } from '@/components/Button';
import { Dialog } from '@/components/Dialog';
import { Empty } from '@/components/Empty';
import { Loading } from '@/components/Loading';
import { Page } from '@/components/Page';
import { Problem } from '@/components/Problem';
import { CloneForm } from '@/features/shows/CloneForm';
import { ShowCard } from '@/features/shows/ShowCard';
import { ShowForm } from '@/features/shows/ShowForm';
import { nightEndsHour, sortShows } from '@/features/shows/sortShows';
import { useShows } from '@/features/shows/useShows';
import { paths } from '@/lib/paths';
import { crewLinks } from '@/lib/showLinks';
import { useSession } from '@/lib/useSession';
import { localDate } from '@/lib/words';
import { DemoOffer } from './DemoOffer';

/** Today's date of the night. */
const tonight = (): string => localDate(new Date(Date.now() - nightEndsHour * 3_600_000));

const groups = [
  { key: 'tonight', title: 'Tonight' },
  { key: 'coming', title: 'Coming' },
  { key: 'past', title: 'Past' },
] as const;

/** The crew's nights. */
export const ShowsPage = () => {
  const session = useSession();
  const go = useNavigate();
  const { shows, make, clone, remove } = useShows();
  const [making, setMaking] = useState(false);
  const [cloned, setCloned] = useState<Show | null>(null);
  const makes = session.may('show.make');
  const sorted = sortShows(shows.data ?? [], tonight());
  const open = (show: Show) => void go(paths.show(show.id));
  const makeButton = makes && (
    <Button variant="primary" onClick={() => setMaking(true)}>
      Make a show
    </Button>
  );
  return (
    <Page light="day" title="Shows" where={session.data?.crew?.name} links={crewLinks}>
      <div className="mb-4 flex flex-wrap items-center justify-between gap-3">
        <p className="text-3xl font-extrabold" aria-hidden="true">
          Shows
        </p>
        {shows.data && shows.data.length > 0 && makeButton}
      </div>
      {shows.isPending && <Loading label="Shows" />}
      {shows.error && <Problem problem={shows.error} onRetry={() => void shows.refetch()} />}
      {remove.error && <Problem problem={remove.error} onRetry={() => remove.reset()} />}
      {shows.data?.length === 0 && (
        <Empty
          title="No show yet"
          action={
            <div className="flex w-full flex-col gap-3">
              <div>{makeButton}</div>
              {session.may('demo.make') && <DemoOffer />}
            </div>
          }
        >
          A show is one dated night: its phases, its venue, its scenes and the displays that draw them.
        </Empty>
      )}
      {groups
        .filter(({ key }) => sorted[key].length > 0)
        .map(({ key, title }) => (
          <section key={key} className="mb-6">
            <h2 className="mb-2 text-lg font-bold text-(--quiet)">{title}</h2>
            <ul className="grid gap-3 sm:grid-cols-2 xl:grid-cols-3">
              {sorted[key].map((show) => (
                <ShowCard
                  key={show.id}
                  show={show}
                  onClone={makes ? () => setCloned(show) : undefined}
                  onDelete={
                    session.may('show.delete') && show.mode !== 'live'
                      ? () => remove.mutate(show.id)
                      : undefined
                  }
                />
              ))}
            </ul>
          </section>
        ))}
      <Dialog title="Make a show" open={making} onClose={() => setMaking(false)}>
        <ShowForm
          start={{ name: '', date: tonight(), venueId: null, brandId: null, client: '' }}
          submit="Make it"
          busy={make.isPending}
          problem={make.error}
          onSubmit={(values) => make.mutate(values, { onSuccess: open })}
        />
      </Dialog>
      <Dialog title="Clone a show" open={cloned !== null} onClose={() => setCloned(null)}>
        {cloned && (
          <CloneForm
            show={cloned}
            date={tonight()}
            busy={clone.isPending}
            problem={clone.error}
            onSubmit={(values) => clone.mutate({ id: cloned.id, ...values }, { onSuccess: open })}
          />
        )}
      </Dialog>
    </Page>
  );
};
