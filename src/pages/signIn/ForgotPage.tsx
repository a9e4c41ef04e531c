import { useMutation } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { forgotSchema } from '#shared/api/accounts';
import { Empty } from '@/components/Empty';
import { Field } from '@/components/Field';
import { Page } from '@/components/Page';
import { FormCard } from '@/features/accounts/FormCard';
import { api } from '@/lib/api';
import { paths } from '@/lib/paths';
import { useForm } from '@/lib/useForm';
import { useSession } from '@/lib/useSession';

/** Asks for a link by mail. The answer is the same whether the mail is known or not. */
export const ForgotPage = () => {
  const session = useSession();
  const form = useForm(forgotSchema, { email: '' });
  const ask = useMutation({
    mutationFn: (body: { email: string }) => api.post('/api/password/forgot', body),
  });
  return (
    <Page light="night" title="Forgot the password">
      {ask.isSuccess ? (
        <div className="mx-auto mt-6 max-w-md">
          <Empty
            title="Look at your mail"
            action={
              session.data?.mailKept && (
                <Link className="underline" to={paths.mail()}>
                  Mail kept on this machine
                </Link>
              )
            }
          >
            If that address belongs to somebody here, a link is on its way. It works once, for an hour.
          </Empty>
        </div>
      ) : (
        <FormCard
          title="Forgot the password"
          intro="We mail you a link to choose a new one."
          submit="Send the link"
          busy={ask.isPending}
          problem={ask.error}
          onSubmit={() => {
            const body = form.check();
            if (body) ask.mutate(body);
          }}
          foot={
            <Link className="flex min-h-11 items-center underline" to={paths.signIn()}>
              Back to sign in
            </Link>
          }
        >
          <Field label="Mail" type="email" autoComplete="username" required {...form.text('email')} />
        </FormCard>
      )}
    </Page>
  );
};
