import type { VenueBody } from '#shared/venue/schema';
import { Skyline } from '@/features/skyline/Skyline';
import { screenLooks } from '@/features/skyline/screenLook';
import { useTick } from '@/hooks/useTick';
import type { LinkSnapshot, ShowLink } from '@/link/types';

interface Props {
  link: ShowLink;
  snapshot: LinkSnapshot;
  venue: VenueBody | null;
  /** Most height, CSS pixels. */
  height: number;
  chosen?: readonly string[];
  onToggle?: (screenId: string) => void;
}

/** The skyline that heads every page about a show. */
export const ShowSkyline = ({ link, snapshot, venue, height, chosen, onToggle }: Props) => {
  useTick(500);
  if (!venue) return null;
  const ids = venue.screens.map((screen) => screen.id);
  return (
    <Skyline
      screens={venue.screens}
      looks={screenLooks(snapshot, ids, link.hubNow())}
      maxHeight={height}
      chosen={chosen}
      onToggle={onToggle}
    />
  );
};
