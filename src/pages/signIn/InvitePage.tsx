import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { acceptSchema, type InvitationDetails, type Session } from '#shared/api/accounts';
import { Field } from '@/components/Field';
import { Loading } from '@/components/Loading';
import { Page } from '@/components/Page';
import { Problem } from '@/components/Problem';
import { FormCard } from '@/features/accounts/FormCard';
import { PasswordField } from '@/features/accounts/PasswordField';
import { api } from '@/lib/api';
import { hashToken } from '@/lib/hashToken';
import { paths } from '@/lib/paths';
import { queryKeys } from '@/lib/queryKeys';
import { useForm } from '@/lib/useForm';

/** Joining a crew, by the link from the mail. */
export const InvitePage = () => {
  const [token] = useState(hashToken);
  const go = useNavigate();
  const client = useQueryClient();
  const form = useForm(acceptSchema, { token, name: '', password: '' });
  const details = useQuery({
    queryKey: ['invitation', token],
    queryFn: () => api.post<InvitationDetails>('/api/invitations/read', { token }),
    retry: false,
  });
  const accept = useMutation({
    mutationFn: (body: { token: string; name: string; password: string }) =>
      api.post<Session>('/api/invitations/accept', body),
    onSuccess: async () => {
      await client.refetchQueries({ queryKey: queryKeys.session });
      void go(paths.shows());
    },
  });
  return (
    <Page light="night" title="Join the crew">
      {details.isPending && <Loading label="Your invitation" />}
      {details.error && (
        <div className="mx-auto mt-6 max-w-md">
          <Problem problem={details.error} onRetry={() => void details.refetch()} />
        </div>
      )}
      {details.data && (
        <FormCard
          title={`Join ${details.data.crewName}`}
          intro={`As ${details.data.role}, with ${details.data.email}.`}
          submit="Join"
          busy={accept.isPending}
          problem={accept.error}
          onSubmit={() => {
            const body = form.check();
            if (body) accept.mutate(body);
          }}
        >
          <Field label="Your name" autoComplete="name" required {...form.text('name')} />
          <PasswordField label="Password" fresh {...form.text('password')} />
        </FormCard>
      )}
    </Page>
  );
};
