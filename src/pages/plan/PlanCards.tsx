import { Link } from 'react-router-dom';
import type { ShowDetail } from '#shared/api/shows';
import { Card } from '@/components/Card';
import { StateTag } from '@/components/StateTag';
import { FactList } from '@/features/plan/FactList';
import { paths } from '@/lib/paths';
import { count, momentWords } from '@/lib/words';
import type { usePlan } from './usePlan';

type Plan = ReturnType<typeof usePlan>;

const todo = (words: string, to: string) => (
  <Link to={to} className="inline-flex min-h-6 items-center underline">
    <StateTag state="look">{words}</StateTag>
  </Link>
);

/** What stands before doors, each as a fact with the way to mend it. */
export const BeforeDoors = ({ show, plan }: { show: ShowDetail; plan: Plan }) => {
  const screens = show.venue?.body.screens.length ?? 0;
  const displays = plan.displays.data?.length ?? 0;
  const bare = show.phases.filter((phase) => !plan.byPhase[phase.id]).length;
  const mapped = new Set(
    plan.displays.data?.flatMap((display) => display.map.regions.map((region) => region.screenId)),
  ).size;
  const scenes = paths.scenes(show.id);
  const outputs = paths.outputs(show.id);
  return (
    <Card title="Before doors">
      <FactList
        facts={[
          {
            what: 'Screens measured',
            value: screens > 0 ? screens : <StateTag state="look">none yet</StateTag>,
          },
          {
            what: 'Phases with scenes',
            value:
              bare === 0
                ? `all ${show.phases.length}`
                : todo(`${bare} of ${show.phases.length} without`, scenes),
          },
          { what: 'Displays joined', value: displays > 0 ? displays : todo('none yet', outputs) },
          {
            what: 'Screens on an output map',
            value:
              screens > 0 && mapped >= screens ? `all ${screens}` : todo(`${mapped} of ${screens}`, outputs),
          },
          { what: 'Flash', value: 'not checked yet' },
        ]}
      />
    </Card>
  );
};

/** Who is in the crew. */
export const CrewCard = ({ plan }: { plan: Plan }) => (
  <Card
    title="Crew"
    end={
      <Link to={paths.crew()} className="flex min-h-11 items-center underline">
        People and roles
      </Link>
    }
  >
    <FactList
      facts={[
        ...(plan.crew.data?.members.map((member) => ({ what: member.name, value: member.role as string })) ??
          []),
        ...(plan.crew.data?.invitations.map((one) => ({ what: one.email, value: `${one.role}, invited` })) ??
          []),
      ]}
    />
  </Card>
);

/** The facts of the show itself. */
export const ShowFacts = ({ show, plan }: { show: ShowDetail; plan: Plan }) => (
  <Card title="The show">
    <FactList
      facts={[
        { what: 'Client', value: show.client || 'none named' },
        { what: 'Brand', value: show.brandName ?? 'none' },
        { what: 'Scenes', value: plan.scenes.data ? count(plan.scenes.data.length, 'scene') : '–' },
        { what: 'Opened', value: momentWords(show.openedAt) },
        { what: 'Closed', value: momentWords(show.closedAt) },
      ]}
    />
  </Card>
);
