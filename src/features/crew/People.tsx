import type { Member } from '#shared/api/accounts';
import { type Role, roles } from '#shared/show/roles';
import { Hold } from '@/components/Hold';
import { Select } from '@/components/Select';
import { momentWords } from '@/lib/words';

interface Props {
  members: readonly Member[];
  /** Own id: nobody removes themselves here. */
  me: string | null;
  /** True for those who may give roles. */
  rules: boolean;
  onRole: (id: string, role: Role) => void;
  onRemove: (id: string) => void;
}

/** The people of the crew and what each is. */
export const People = ({ members, me, rules, onRole, onRemove }: Props) => (
  <ul className="divide-y divide-(--line)">
    {members.map((member) => (
      <li key={member.id} className="flex flex-wrap items-center gap-x-4 gap-y-2 py-3">
        <div className="min-w-52 flex-1">
          <p className="font-bold">
            {member.name} {member.id === me && <span className="font-normal text-(--quiet)">· you</span>}
          </p>
          <p className="text-sm break-all text-(--quiet)">{member.email}</p>
          <p className="text-sm text-(--quiet)">last in {momentWords(member.lastSignInAt)}</p>
        </div>
        {rules ? (
          <Select
            label={`Role of ${member.name}`}
            value={member.role}
            options={roles.map((role) => ({ value: role, label: role }))}
            onChange={(event) => onRole(member.id, event.target.value as Role)}
          />
        ) : (
          <p>{member.role}</p>
        )}
        {rules && member.id !== me && (
          <Hold label="Hold to remove" className="self-end" onHeld={() => onRemove(member.id)} />
        )}
      </li>
    ))}
  </ul>
);
