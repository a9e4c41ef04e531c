import { useTick } from '@/hooks/useTick';
import type { LinkSnapshot } from '@/link/types';

/** Says plainly when the link to the hub is away, and since when. */
export const LinkBand = ({ snapshot }: { snapshot: LinkSnapshot }) => {
  const now = useTick(snapshot.status === 'on' ? null : 500);
  const words = {
    on: null,
    joining: 'Joining the hub',
    away: `No link for ${Math.max(0, Math.floor((now - (snapshot.awaySince ?? now)) / 1000))} s. Nothing is sent.`,
    refused: snapshot.refusedWhy ?? 'The hub refused this page.',
    outdated: 'The hub is newer than this page: reload it.',
  }[snapshot.status];
  if (!words) return null;
  return (
    <p role="status" className="mb-3 rounded-xl border border-dashed border-(--coral) p-3 text-(--coral)">
      ✕ {words}
    </p>
  );
};
