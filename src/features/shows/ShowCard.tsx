import { Link } from 'react-router-dom';
import type { Show } from '#shared/api/shows';
import { Button } from '@/components/Button';
import { Hold } from '@/components/Hold';
import { StateTag } from '@/components/StateTag';
import { paths } from '@/lib/paths';
import { count, dayWords } from '@/lib/words';

interface Props {
  show: Show;
  onClone?: () => void;
  onDelete?: () => void;
}

/** One night: name, place, what there is, and its state. */
export const ShowCard = ({ show, onClone, onDelete }: Props) => (
  <li className="flex min-w-0 flex-col gap-3 rounded-2xl border border-(--line) bg-(--raised) p-5">
    <div className="flex items-baseline justify-between gap-3">
      <p className="font-mono text-(--quiet)">{dayWords(show.date)}</p>
      {show.mode === 'live' ? (
        <StateTag state="on">open</StateTag>
      ) : (
        <span className="text-(--quiet)">{show.mode}</span>
      )}
    </div>
    <Link to={paths.show(show.id)} className="text-2xl font-bold break-words hover:underline">
      {show.name}
    </Link>
    <p className="text-(--quiet)">
      {[show.venueName ?? 'no venue yet', show.client || show.brandName].filter(Boolean).join(' · ')}
    </p>
    <p>
      {count(show.sceneCount, 'scene')} · {count(show.displayCount, 'display')}
    </p>
    <div className="mt-auto flex flex-wrap gap-2">
      {onClone && (
        <Button onClick={onClone} aria-label={`Clone ${show.name}`}>
          Clone
        </Button>
      )}
      {onDelete && <Hold label="Hold to delete" onHeld={onDelete} />}
    </div>
  </li>
);
