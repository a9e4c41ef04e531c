import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useNavigate } from 'react-router-dom';
import { Button } from '@/components/Button';
import { Card } from '@/components/Card';
import { Loading } from '@/components/Loading';
import { Page } from '@/components/Page';
import { Problem } from '@/components/Problem';
import { ChangePassword } from '@/features/crew/ChangePassword';
import { Invitations } from '@/features/crew/Invitations';
import { MySignIns } from '@/features/crew/MySignIns';
import { People } from '@/features/crew/People';
import { RoleTable } from '@/features/crew/RoleTable';
import { useCrew } from '@/features/crew/useCrew';
import { api } from '@/lib/api';
import { paths } from '@/lib/paths';
import { crewLinks } from '@/lib/showLinks';
import { useSession } from '@/lib/useSession';
import { count } from '@/lib/words';

const SignOut = () => {
  const client = useQueryClient();
  const go = useNavigate();
  const out = useMutation({
    mutationFn: () => api.delete('/api/session'),
    onSuccess: () => {
      client.clear();
      void go(paths.signIn());
    },
  });
  return (
    <>
      {out.error && <Problem problem={out.error} />}
      <Button onClick={() => out.mutate()}>Sign out</Button>
    </>
  );
};

/** People, roles, invitations; one's own sign-ins and password. */
export const CrewPage = () => {
  const session = useSession();
  const { crew, invite, revoke, changeRole, remove } = useCrew();
  const problem = invite.error ?? revoke.error ?? changeRole.error ?? remove.error;
  return (
    <Page light="day" title="Crew" where={session.data?.crew?.name} links={crewLinks}>
      {crew.isPending && <Loading label="The crew" />}
      {crew.error && <Problem problem={crew.error} onRetry={() => void crew.refetch()} />}
      <div className="grid items-start gap-4 lg:grid-cols-2">
        {crew.data && (
          <Card title={crew.data.name} note={count(crew.data.members.length, 'person', 'people')}>
            {problem && <Problem problem={problem} />}
            <People
              members={crew.data.members}
              me={session.user?.id ?? null}
              rules={session.may('crew.changeRole')}
              onRole={(id, role) => changeRole.mutate({ id, role })}
              onRemove={(id) => remove.mutate(id)}
            />
          </Card>
        )}
        {crew.data && session.may('invitation.make') && (
          <Card title="Invite by mail" note="a link that works once, for 7 days">
            <Invitations
              key={crew.data.invitations.length}
              open={crew.data.invitations}
              busy={invite.isPending}
              onInvite={(body) => invite.mutate(body)}
              onRevoke={(id) => revoke.mutate(id)}
            />
          </Card>
        )}
        <Card title="Who may do what" className="lg:col-span-2">
          <RoleTable />
        </Card>
        <Card title="My sign-ins" end={<SignOut />}>
          <MySignIns />
        </Card>
        <Card title="My password">
          <ChangePassword />
        </Card>
      </div>
    </Page>
  );
};
