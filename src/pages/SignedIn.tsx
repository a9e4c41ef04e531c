import { Navigate, Outlet, useLocation } from 'react-router-dom';
import { Loading } from '@/components/Loading';
import { Problem } from '@/components/Problem';
import { paths } from '@/lib/paths';
import { useSession } from '@/lib/useSession';

/** Lets the crew in; everybody else goes to sign in and comes back to where they were going. */
export const SignedIn = () => {
  const session = useSession();
  const place = useLocation();
  if (session.isPending) return <Loading label="Lampyrid" />;
  if (session.error && !session.data)
    return <Problem problem={session.error} onRetry={() => void session.refetch()} />;
  if (!session.user)
    return <Navigate to={paths.signIn()} replace state={{ from: place.pathname + place.search }} />;
  return <Outlet />;
};
