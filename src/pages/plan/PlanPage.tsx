import { useState } from 'react';
import { useLocation, useParams } from 'react-router-dom';
import type { VenueBody } from '#shared/venue/schema';
import { Button } from '@/components/Button';
import { Dialog } from '@/components/Dialog';
import { Loading } from '@/components/Loading';
import { Page } from '@/components/Page';
import { Problem } from '@/components/Problem';
import { StateTag } from '@/components/StateTag';
import { OpenClose } from '@/features/plan/OpenClose';
import { SafetyBlock } from '@/features/plan/SafetyBlock';
import { NextStep } from '@/features/shows/NextStep';
import { ShowForm } from '@/features/shows/ShowForm';
import { useShowLink } from '@/hooks/useShowLink';
import { showLinks } from '@/lib/showLinks';
import { useSession } from '@/lib/useSession';
import { dayWords } from '@/lib/words';
import { ShowSkyline } from '../ShowSkyline';
import { NightCard } from './NightCard';
import { BeforeDoors, CrewCard, ShowFacts } from './PlanCards';
import { usePlan } from './usePlan';
import { VenueCard } from './VenueCard';

/** A show's plan: the room, the night, and what is missing before doors. */
export const PlanPage = () => {
  const { showId = '' } = useParams();
  const place = useLocation();
  const session = useSession();
  const plan = usePlan(showId);
  const { link, snapshot } = useShowLink(showId);
  const [room, setRoom] = useState<VenueBody | null>(null);
  const [editing, setEditing] = useState(false);
  const show = plan.show.data;
  const newcomer = (place.state as { newcomer?: boolean } | null)?.newcomer === true;
  const dark = plan.displays.data?.length === 0;
  return (
    <Page light="day" title={show?.name ?? 'Plan'} where={show?.name} links={showLinks(showId)}>
      {plan.show.isPending && <Loading label="The show" />}
      {plan.show.error && <Problem problem={plan.show.error} onRetry={() => void plan.show.refetch()} />}
      {show && (
        <div className="flex flex-col gap-4">
          <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
            <p className="text-3xl font-extrabold" aria-hidden="true">
              {show.name}
            </p>
            <p className="text-(--quiet)">
              {[dayWords(show.date), show.venueName, show.client && `for ${show.client}`]
                .filter(Boolean)
                .join(' · ')}
            </p>
            {show.mode === 'live' && <StateTag state="on">open</StateTag>}
            <div className="ml-auto flex flex-wrap items-center gap-2">
              {session.may('show.edit') && <Button onClick={() => setEditing(true)}>Edit details</Button>}
              {session.may('show.open') && <OpenClose show={show} />}
            </div>
          </div>
          {(newcomer || dark) && <NextStep showId={show.id} />}
          <div data-light="night" className="rounded-2xl bg-(--ground) p-4 text-(--text)">
            <ShowSkyline
              link={link}
              snapshot={snapshot}
              venue={room ?? show.venue?.body ?? null}
              height={170}
            />
            {!show.venue && !room && <p className="text-(--quiet)">The skyline appears with the venue.</p>}
          </div>
          <NightCard show={show} byPhase={plan.byPhase} edits={session.may('show.edit')} />
          <div className="grid items-start gap-4 md:grid-cols-2 xl:grid-cols-3">
            <BeforeDoors show={show} plan={plan} />
            <VenueCard show={show} edits={session.may('venue.edit')} onDraft={setRoom} />
            <div className="flex flex-col gap-4">
              <ShowFacts show={show} plan={plan} />
              <CrewCard plan={plan} />
            </div>
          </div>
          <SafetyBlock />
          <Dialog title="The show" open={editing} onClose={() => setEditing(false)}>
            <ShowForm
              start={{
                name: show.name,
                date: show.date,
                venueId: show.venueId,
                brandId: show.brandId,
                client: show.client,
              }}
              submit="Save"
              busy={plan.edit.isPending}
              problem={plan.edit.error}
              onSubmit={(values) => plan.edit.mutate(values, { onSuccess: () => setEditing(false) })}
            />
          </Dialog>
        </div>
      )}
    </Page>
  );
};
