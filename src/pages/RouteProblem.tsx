import { Link, useRouteError } from 'react-router-dom';
import { Page } from '@/components/Page';
import { Problem } from '@/components/Problem';
import { paths } from '@/lib/paths';

/** A page that is not there, or that fell over: says so and shows the way back. */
export const RouteProblem = () => {
  const error = useRouteError();
  return (
    <Page light="night" title="Not here">
      <div className="mx-auto mt-10 flex max-w-xl flex-col gap-4">
        <Problem
          problem={
            error ?? {
              detail: 'There is no such page.',
              mend: 'It may have been deleted, or the address is off.',
            }
          }
          onRetry={error ? () => window.location.reload() : undefined}
        />
        <Link to={paths.shows()} className="text-(--moonlight) underline">
          To the shows
        </Link>
      </div>
    </Page>
  );
};
