import { useMutation, useQueryClient } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { type Session, signInSchema } from '#shared/api/accounts';
import { Field } from '@/components/Field';
import { api } from '@/lib/api';
import { paths } from '@/lib/paths';
import { queryKeys } from '@/lib/queryKeys';
import { useForm } from '@/lib/useForm';
import { FormCard } from './FormCard';
import { PasswordField } from './PasswordField';

/** Mail and password; `onIn` is called when the server has let one in. */
export const SignInForm = ({ onIn, mailKept }: { onIn: () => void; mailKept: boolean }) => {
  const client = useQueryClient();
  const form = useForm(signInSchema, { email: '', password: '' });
  const signIn = useMutation({
    mutationFn: (body: { email: string; password: string }) => api.post<Session>('/api/session', body),
    onSuccess: async () => {
      client.removeQueries({ predicate: (query) => query.queryKey[0] !== queryKeys.session[0] });
      await client.refetchQueries({ queryKey: queryKeys.session });
      onIn();
    },
  });
  return (
    <FormCard
      title="Sign in"
      submit="Sign in"
      busy={signIn.isPending}
      problem={signIn.error}
      onSubmit={() => {
        const body = form.check();
        if (body) signIn.mutate(body);
      }}
      foot={
        <p className="flex flex-wrap gap-x-4">
          <Link className="flex min-h-11 items-center underline" to={paths.forgot()}>
            Forgot the password
          </Link>
          {mailKept && (
            <Link className="flex min-h-11 items-center underline" to={paths.mail()}>
              Mail kept on this machine
            </Link>
          )}
        </p>
      }
    >
      <Field label="Mail" type="email" autoComplete="username" required {...form.text('email')} />
      <PasswordField label="Password" {...form.text('password')} />
    </FormCard>
  );
};
