import type { VenueBody } from '#shared/venue/schema';
import { Button } from '@/components/Button';
import { Field } from '@/components/Field';
import { toggleInGroup } from './venueEdits';

/** Groups: screens that are fired as one. */
export const GroupRows = ({ body, onChange }: { body: VenueBody; onChange: (body: VenueBody) => void }) => (
  <ul className="flex flex-col gap-3">
    {body.groups.map((group) => (
      <li key={group.id} className="flex flex-wrap items-end gap-2">
        <Field
          label="Group"
          value={group.name}
          maxLength={40}
          className="min-w-40"
          onChange={(event) =>
            onChange({
              ...body,
              groups: body.groups.map((one) =>
                one.id === group.id ? { ...one, name: event.target.value } : one,
              ),
            })
          }
        />
        {body.screens.map((screen) => (
          <Button
            key={screen.id}
            aria-pressed={group.screenIds.includes(screen.id)}
            onClick={() => onChange(toggleInGroup(body, group.id, screen.id))}
          >
            {screen.name}
          </Button>
        ))}
        <Button
          aria-label={`Remove the group ${group.name}`}
          onClick={() => onChange({ ...body, groups: body.groups.filter((one) => one.id !== group.id) })}
        >
          Remove
        </Button>
      </li>
    ))}
  </ul>
);
