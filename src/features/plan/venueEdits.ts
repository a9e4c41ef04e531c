import type { Screen, VenueBody } from '#shared/venue/schema';

/** A venue before anything is measured. */
export const emptyVenue: VenueBody = { ambientLux: 30, screens: [], groups: [] };

/** A new screen: 4 m by 2.25 m, its middle 2.5 m up, beside those that are there. */
export const addScreen = (body: VenueBody, id: string): VenueBody => {
  const right = Math.max(0, ...body.screens.map((screen) => screen.centre[0] + screen.width / 2));
  const screen: Screen = {
    id,
    name: `Screen ${body.screens.length + 1}`,
    kind: 'projection',
    width: 4,
    height: 2.25,
    gain: 1,
    centre: [body.screens.length === 0 ? 0 : right + 2.5, 2.5, 0],
    yaw: 0,
    tilt: 0,
    roll: 0,
  };
  return { ...body, screens: [...body.screens, screen] };
};

/** A venue without a screen; groups lose it too, and a group that held only it goes. */
export const removeScreen = (body: VenueBody, id: string): VenueBody => ({
  ...body,
  screens: body.screens.filter((screen) => screen.id !== id),
  groups: body.groups
    .map((group) => ({ ...group, screenIds: group.screenIds.filter((one) => one !== id) }))
    .filter((group) => group.screenIds.length > 0),
});

/** A screen put into a group, or taken out. */
export const toggleInGroup = (body: VenueBody, groupId: string, screenId: string): VenueBody => ({
  ...body,
  groups: body.groups.map((group) =>
    group.id === groupId
      ? {
          ...group,
          screenIds: group.screenIds.includes(screenId)
            ? group.screenIds.filter((id) => id !== screenId)
            : [...group.screenIds, screenId],
        }
      : group,
  ),
});

/** What is wrong with a venue as people would say it, from a schema's path and message. */
export const venueFault = (body: VenueBody, path: readonly PropertyKey[], message: string): string => {
  const index = Number(path[2] ?? -1);
  const list = path[1] === 'screens' ? body.screens : body.groups;
  const name = path[0] === 'name' ? 'Venue' : (list[index]?.name ?? 'Venue') || 'One without a name';
  if (path[1] === 'groups' && path[3] === 'screenIds') return `${name}: choose at least one screen.`;
  return `${name}: ${String(path[3] ?? 'name')} is off. ${message}`;
};
