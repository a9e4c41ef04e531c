import { useEffect, useState } from 'react';
import { Link, useNavigate } from 'react-router-dom';
import { Empty } from '@/components/Empty';
import { Page } from '@/components/Page';
import { SetUpForm } from '@/features/accounts/SetUpForm';
import { DemoProgress } from '@/features/shows/DemoProgress';
import { useDemo } from '@/features/shows/useDemo';
import { paths } from '@/lib/paths';
import { useSession } from '@/lib/useSession';

/** The one-time set-up: crew and lead, then the demo night or an empty house. */
export const SetUpPage = () => {
  const session = useSession();
  const go = useNavigate();
  const [made, setMade] = useState<'no' | 'empty' | 'demo'>('no');
  const { progress } = useDemo(made === 'demo' && session.user !== null);
  const showId = progress.data?.state === 'ready' ? progress.data.showId : null;
  useEffect(() => {
    if (showId) void go(paths.show(showId), { replace: true, state: { newcomer: true } });
  }, [showId, go]);
  useEffect(() => {
    if (made === 'empty' && session.user) void go(paths.shows(), { replace: true });
  }, [made, session.user, go]);
  return (
    <Page light="night" title="Set up">
      {made === 'demo' ? (
        <div className="mx-auto mt-6 flex max-w-md flex-col gap-4 rounded-2xl border border-(--line) bg-(--raised) p-6">
          <h2 className="text-2xl font-bold">Making the demo night</h2>
          <DemoProgress
            progress={progress.data ?? { state: 'working', progress: 0, words: 'Starting', showId: null }}
          />
          <Link className="underline" to={paths.shows()}>
            Go to the shows meanwhile
          </Link>
        </div>
      ) : session.data && !session.data.setUpOpen ? (
        <div className="mx-auto mt-6 max-w-md">
          <Empty
            title="The crew is made already"
            action={
              <Link className="underline" to={paths.signIn()}>
                Sign in
              </Link>
            }
          >
            A set-up link works once. Ask your lead to invite you.
          </Empty>
        </div>
      ) : (
        <SetUpForm onDone={(demo) => setMade(demo ? 'demo' : 'empty')} />
      )}
    </Page>
  );
};
