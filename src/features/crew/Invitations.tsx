import { type Invitation, inviteSchema } from '#shared/api/accounts';
import { type Role, roles } from '#shared/show/roles';
import { Button } from '@/components/Button';
import { Field } from '@/components/Field';
import { Select } from '@/components/Select';
import { useForm } from '@/lib/useForm';
import { momentWords } from '@/lib/words';
import { roleWords } from './roleWords';

interface Props {
  open: readonly Invitation[];
  busy: boolean;
  onInvite: (body: { email: string; role: Role }) => void;
  onRevoke: (id: string) => void;
}

/** Ask somebody in by mail, and take an invitation back. */
export const Invitations = ({ open, busy, onInvite, onRevoke }: Props) => {
  const form = useForm(inviteSchema, { email: '', role: 'operator' });
  return (
    <div className="flex flex-col gap-4">
      <form
        noValidate
        className="flex flex-wrap items-start gap-3"
        onSubmit={(event) => {
          event.preventDefault();
          const body = form.check();
          if (body) onInvite(body);
        }}
      >
        <Field label="Mail" type="email" className="min-w-52" {...form.text('email')} />
        <Select
          label="Role"
          value={form.values.role}
          options={roles.map((role) => ({ value: role, label: `${role}: ${roleWords[role]}` }))}
          onChange={(event) => form.set('role', event.target.value as Role)}
        />
        <Button variant="primary" type="submit" className="mt-6" disabled={busy}>
          Invite
        </Button>
      </form>
      <ul className="divide-y divide-(--line)">
        {open.map((one) => (
          <li key={one.id} className="flex flex-wrap items-center gap-3 py-2">
            <p className="min-w-0 flex-1 break-all">
              {one.email}{' '}
              <span className="text-(--quiet)">
                as {one.role}, until {momentWords(one.expiresAt)}
              </span>
            </p>
            <Button onClick={() => onRevoke(one.id)} aria-label={`Take back the invitation of ${one.email}`}>
              Take back
            </Button>
          </li>
        ))}
      </ul>
    </div>
  );
};
