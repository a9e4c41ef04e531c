import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { editVenueSchema, type ShowDetail, type Venue } from '#shared/api/shows';
import type { VenueBody } from '#shared/venue/schema';
import { Button } from '@/components/Button';
import { Field } from '@/components/Field';
import { Problem } from '@/components/Problem';
import { api } from '@/lib/api';
import { newId } from '@/lib/newId';
import { queryKeys } from '@/lib/queryKeys';
import { GroupRows } from './GroupRows';
import { ScreenRow } from './ScreenRow';
import { addScreen, emptyVenue, removeScreen, venueFault } from './venueEdits';

interface Props {
  show: ShowDetail;
  onDone: () => void;
  /** Called at each change, so that the skyline can follow. */
  onDraft: (body: VenueBody) => void;
}

interface Named {
  name: string;
  body: VenueBody;
}

/** Screens and groups of the venue, by numbers. Saved as a whole. */
export const VenueEditor = ({ show, onDone, onDraft }: Props) => {
  const client = useQueryClient();
  const [venue, setVenue] = useState<Named>(show.venue ?? { name: show.venueName ?? '', body: emptyVenue });
  const [fault, setFault] = useState<string | null>(null);
  const save = useMutation({
    mutationFn: async (body: Named) => {
      if (show.venue) return api.put<Venue>(`/api/venues/${show.venue.id}`, body);
      const made = await api.post<Venue>('/api/venues', body);
      await api.patch(`/api/shows/${show.id}`, { venueId: made.id });
      return made;
    },
    onSuccess: async () => {
      await client.invalidateQueries({ queryKey: queryKeys.shows });
      await client.invalidateQueries({ queryKey: queryKeys.venues });
      onDone();
    },
  });
  const change = (body: VenueBody) => {
    setVenue({ ...venue, body });
    setFault(null);
    const read = editVenueSchema.shape.body.safeParse(body);
    if (read.success) onDraft(read.data);
  };
  const submit = () => {
    const read = editVenueSchema.safeParse({ name: venue.name, body: venue.body });
    const issue = read.error?.issues[0];
    if (read.success) save.mutate(read.data);
    else setFault(venueFault(venue.body, issue?.path ?? [], issue?.message ?? ''));
  };
  const group = () => ({ id: newId(), name: `Group ${venue.body.groups.length + 1}` });
  return (
    <form
      noValidate
      className="flex flex-col gap-4"
      onSubmit={(event) => {
        event.preventDefault();
        submit();
      }}
    >
      <p className="text-sm text-(--quiet)">
        Metres and degrees. Left and right are house left and right, seen from the floor towards the stage.
      </p>
      <Field
        label="Venue"
        value={venue.name}
        maxLength={60}
        onChange={(event) => setVenue({ ...venue, name: event.target.value })}
      />
      <ul className="flex flex-col gap-4">
        {venue.body.screens.map((screen) => (
          <ScreenRow
            key={screen.id}
            screen={screen}
            onChange={(next) =>
              change({
                ...venue.body,
                screens: venue.body.screens.map((one) => (one.id === next.id ? next : one)),
              })
            }
            onRemove={() => change(removeScreen(venue.body, screen.id))}
          />
        ))}
      </ul>
      <GroupRows body={venue.body} onChange={change} />
      {fault && (
        <p role="alert" className="text-(--coral)">
          ✕ {fault}
        </p>
      )}
      {save.error && <Problem problem={save.error} />}
      <div className="flex flex-wrap gap-2">
        <Button
          disabled={venue.body.screens.length >= 32}
          onClick={() => change(addScreen(venue.body, newId()))}
        >
          Add a screen
        </Button>
        <Button
          disabled={venue.body.screens.length === 0 || venue.body.groups.length >= 16}
          onClick={() =>
            change({ ...venue.body, groups: [...venue.body.groups, { ...group(), screenIds: [] }] })
          }
        >
          Add a group
        </Button>
        <span className="flex-1" />
        <Button onClick={onDone}>Leave as it was</Button>
        <Button variant="primary" type="submit" disabled={save.isPending}>
          Save the venue
        </Button>
      </div>
    </form>
  );
};
