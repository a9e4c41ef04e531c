import { useState } from 'react';
import type { ShowDetail } from '#shared/api/shows';
import type { VenueBody } from '#shared/venue/schema';
import { Button } from '@/components/Button';
import { Card } from '@/components/Card';
import { ScreenFacts } from '@/features/plan/ScreenFacts';
import { VenueEditor } from '@/features/plan/VenueEditor';

interface Props {
  show: ShowDetail;
  /** May measure the venue. */
  edits: boolean;
  onDraft: (body: VenueBody | null) => void;
}

/** The venue's screens, read or edited. */
export const VenueCard = ({ show, edits, onDraft }: Props) => {
  const [editing, setEditing] = useState(false);
  return (
    <Card
      title="Screens"
      note={show.venue?.name ?? 'no venue yet'}
      className={editing ? 'md:col-span-2 xl:col-span-3' : ''}
      end={
        edits &&
        !editing && (
          <Button onClick={() => setEditing(true)}>{show.venue ? 'Measure' : 'Make the venue'}</Button>
        )
      }
    >
      {editing ? (
        <VenueEditor
          show={show}
          onDraft={onDraft}
          onDone={() => {
            setEditing(false);
            onDraft(null);
          }}
        />
      ) : show.venue && show.venue.body.screens.length > 0 ? (
        <ScreenFacts body={show.venue.body} />
      ) : (
        <p className="text-(--quiet)">Every wall, cloth, LED wall and TV that guests look at, in metres.</p>
      )}
    </Card>
  );
};
