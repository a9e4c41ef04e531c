import { Navigate, useLocation } from 'react-router-dom';
import { Page } from '@/components/Page';
import { SignInForm } from '@/features/accounts/SignInForm';
import { paths } from '@/lib/paths';
import { useSession } from '@/lib/useSession';

const cameFrom = (state: unknown): string => {
  const from = typeof state === 'object' && state !== null && 'from' in state ? state.from : null;
  return typeof from === 'string' && from.startsWith('/') && !from.startsWith('//') ? from : paths.shows();
};

/** The door. Whoever is in already goes on to where they were going. */
export const SignInPage = () => {
  const place = useLocation();
  const session = useSession();
  const to = cameFrom(place.state);
  if (session.user) return <Navigate to={to} replace />;
  return (
    <Page light="night" title="Sign in">
      {session.data?.setUpOpen && (
        <p className="mx-auto mt-6 max-w-md text-(--amber)">
          ▲ There is no crew yet. Open the set-up link that Lampyrid printed when it started.
        </p>
      )}
      <SignInForm mailKept={session.data?.mailKept ?? false} onIn={() => undefined} />
    </Page>
  );
};
