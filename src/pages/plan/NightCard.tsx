import { useState } from 'react';
import type { Phase, ShowDetail } from '#shared/api/shows';
import { Button } from '@/components/Button';
import { Card } from '@/components/Card';
import { NightCurve } from '@/features/plan/NightCurve';
import { PhaseTable } from '@/features/plan/PhaseTable';

interface Props {
  show: ShowDetail;
  byPhase: Readonly<Record<string, number>>;
  edits: boolean;
}

/** The night as one line, and its phases. */
export const NightCard = ({ show, byPhase, edits }: Props) => {
  const [draft, setDraft] = useState<Phase[] | null>(null);
  const editing = draft !== null;
  const phases = draft ?? show.phases;
  return (
    <Card
      title="The night"
      note="the line is the energy you plan"
      end={edits && !editing && <Button onClick={() => setDraft(show.phases)}>Edit the phases</Button>}
    >
      <NightCurve phases={phases} scenes={byPhase} />
      {editing && (
        <PhaseTable showId={show.id} phases={show.phases} onDraft={setDraft} onDone={() => setDraft(null)} />
      )}
    </Card>
  );
};
