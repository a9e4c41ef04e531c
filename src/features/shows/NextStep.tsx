import { Link } from 'react-router-dom';
import { paths } from '@/lib/paths';

/** What a newcomer does next: light up a display. */
export const NextStep = ({ showId }: { showId: string }) => (
  <section className="flex flex-wrap items-center gap-4 rounded-2xl border border-(--line) bg-(--raised) p-5">
    <div className="min-w-60 flex-1">
      <h2 className="text-lg font-bold">Next: light a display</h2>
      <p className="text-(--quiet)">
        Open <span className="font-mono">/display</span> on any machine and type its code under Outputs.
      </p>
    </div>
    <a
      href={paths.display()}
      target="_blank"
      rel="noopener"
      className="flex min-h-11 items-center rounded-lg bg-(--raised-2) px-4 font-bold hover:bg-(--raised-3)"
    >
      Open a display here
    </a>
    <Link
      to={paths.outputs(showId)}
      className="flex min-h-11 items-center rounded-lg bg-(--firefly) px-4 font-bold text-(--on-firefly)"
    >
      Go to Outputs
    </Link>
  </section>
);
