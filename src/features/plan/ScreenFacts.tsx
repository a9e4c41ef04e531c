import type { VenueBody } from '#shared/venue/schema';

const kinds = { projection: 'projection', led: 'LED wall', tv: 'TV' } as const;
const metres = (value: number) => value.toFixed(2);

/** The screens of the venue with their sizes. */
export const ScreenFacts = ({ body }: { body: VenueBody }) => (
  <>
    <ul className="divide-y divide-(--line)">
      {body.screens.map((screen) => (
        <li key={screen.id} className="flex flex-wrap justify-between gap-x-3 py-2">
          <span>{screen.name}</span>
          <span className="text-(--quiet)">
            {kinds[screen.kind]}{' '}
            <span className="font-mono">
              {metres(screen.width)} × {metres(screen.height)} m
            </span>
          </span>
        </li>
      ))}
    </ul>
    {body.groups.length > 0 && (
      <p className="mt-2 text-sm text-(--quiet)">
        Groups: {body.groups.map((group) => group.name).join(', ')}
      </p>
    )}
  </>
);
