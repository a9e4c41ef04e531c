import { useMutation } from '@tanstack/react-query';
import { changePasswordSchema } from '#shared/api/accounts';
import { Button } from '@/components/Button';
import { Field } from '@/components/Field';
import { Problem } from '@/components/Problem';
import { api } from '@/lib/api';
import { useForm } from '@/lib/useForm';

/** Old password, new password. */
export const ChangePassword = () => {
  const form = useForm(changePasswordSchema, { old: '', password: '' });
  const change = useMutation({
    mutationFn: (body: { old: string; password: string }) => api.post('/api/password/change', body),
    onSuccess: () => {
      form.set('old', '');
      form.set('password', '');
    },
  });
  return (
    <form
      noValidate
      className="flex flex-col gap-3"
      onSubmit={(event) => {
        event.preventDefault();
        const body = form.check();
        if (body) change.mutate(body);
      }}
    >
      <Field label="Password now" type="password" autoComplete="current-password" {...form.text('old')} />
      <Field
        label="New password"
        type="password"
        autoComplete="new-password"
        hint="At least 12 characters; a few words make a good one."
        {...form.text('password')}
      />
      {change.error && <Problem problem={change.error} />}
      {change.isSuccess && <p role="status">Changed. Your other sign-ins have ended.</p>}
      <Button type="submit" className="self-start" disabled={change.isPending}>
        Change it
      </Button>
    </form>
  );
};
