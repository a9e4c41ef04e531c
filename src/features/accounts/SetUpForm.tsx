import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { type Session, type SetUp, setUpSchema } from '#shared/api/accounts';
import { Field } from '@/components/Field';
import { Problem } from '@/components/Problem';
import { api } from '@/lib/api';
import { hashToken } from '@/lib/hashToken';
import { queryKeys } from '@/lib/queryKeys';
import { useForm } from '@/lib/useForm';
import { FormCard } from './FormCard';
import { PasswordField } from './PasswordField';

/** First run: the crew, its lead, and whether to bring the demo night. */
export const SetUpForm = ({ onDone }: { onDone: (demo: boolean) => void }) => {
  const client = useQueryClient();
  const [token] = useState(hashToken);
  const form = useForm(setUpSchema, { token, crewName: '', name: '', email: '', password: '', demo: true });
  const make = useMutation({
    mutationFn: (body: SetUp) => api.post<Session>('/api/setup', body),
    onSuccess: async (_session, body) => {
      onDone(body.demo);
      await client.refetchQueries({ queryKey: queryKeys.session });
    },
  });
  return (
    <FormCard
      title="Set up Lampyrid"
      intro="You become the lead: you own the crew and invite the others. This link works once."
      submit="Make the crew"
      busy={make.isPending}
      problem={make.error}
      onSubmit={() => {
        const body = form.check();
        if (body) make.mutate(body);
      }}
    >
      {form.errors.token && (
        <Problem
          problem={{
            detail: 'This set-up link is not whole.',
            mend: 'Copy all of it from where Lampyrid was started.',
          }}
        />
      )}
      <Field label="Crew" autoComplete="organization" required {...form.text('crewName')} />
      <Field label="Your name" autoComplete="name" required {...form.text('name')} />
      <Field label="Your mail" type="email" autoComplete="username" required {...form.text('email')} />
      <PasswordField label="Password" fresh {...form.text('password')} />
      <label className="flex min-h-11 items-center gap-3">
        <input
          type="checkbox"
          className="h-5 w-5 accent-(--firefly)"
          checked={form.values.demo}
          onChange={(event) => form.set('demo', event.target.checked)}
        />
        <span>
          Bring the demo night
          <span className="block text-sm text-(--quiet)">
            A whole show to look at: six screens, twelve scenes.
          </span>
        </span>
      </label>
    </FormCard>
  );
};
