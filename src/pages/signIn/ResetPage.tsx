import { useMutation } from '@tanstack/react-query';
import { useState } from 'react';
import { Link } from 'react-router-dom';
import { resetSchema } from '#shared/api/accounts';
import { Empty } from '@/components/Empty';
import { Page } from '@/components/Page';
import { Problem } from '@/components/Problem';
import { FormCard } from '@/features/accounts/FormCard';
import { PasswordField } from '@/features/accounts/PasswordField';
import { api } from '@/lib/api';
import { hashToken } from '@/lib/hashToken';
import { paths } from '@/lib/paths';
import { useForm } from '@/lib/useForm';

/** A new password, by the link from the mail. */
export const ResetPage = () => {
  const [token] = useState(hashToken);
  const form = useForm(resetSchema, { token, password: '' });
  const reset = useMutation({
    mutationFn: (body: { token: string; password: string }) => api.post('/api/password/reset', body),
  });
  return (
    <Page light="night" title="New password">
      {reset.isSuccess ? (
        <div className="mx-auto mt-6 max-w-md">
          <Empty
            title="Password changed"
            action={
              <Link className="underline" to={paths.signIn()}>
                Sign in
              </Link>
            }
          >
            Every other sign-in of yours has ended.
          </Empty>
        </div>
      ) : (
        <FormCard
          title="New password"
          submit="Change it"
          busy={reset.isPending}
          problem={reset.error}
          onSubmit={() => {
            const body = form.check();
            if (body) reset.mutate(body);
          }}
        >
          {form.errors.token && (
            <Problem
              problem={{
                detail: 'This link is not whole.',
                mend: 'Open it from the mail again, or ask for a new one.',
              }}
            />
          )}
          <PasswordField label="New password" fresh {...form.text('password')} />
        </FormCard>
      )}
    </Page>
  );
};
