import type { Phase } from '#shared/api/shows';
import type { Screen, VenueBody } from '#shared/venue/schema';

export const demoNames = {
  show: 'Salt & Static',
  venue: 'Boathouse 4',
  client: 'Ottergate Cider',
} as const;

/** Colours of the cider house. */
export const demoPalette = ['#04202d', '#1f9a8e', '#e58a3c', '#fff1d6'];

const screen = (
  id: string,
  name: string,
  kind: Screen['kind'],
  [width, height]: [number, number],
  centre: [number, number, number],
  yaw = 0,
): Screen => ({ id, name, kind, width, height, gain: 1, centre, yaw, tilt: 0, roll: 0 });

/** A long wooden room with water under one end. Metres. */
export const demoVenue: VenueBody = {
  ambientLux: 30,
  screens: [
    screen('back', 'Back wall', 'projection', [6, 3.375], [0, 3, 0]),
    screen('sail-l', 'Sail left', 'projection', [2.4, 2.4], [-5.2, 3.1, 1.6], 35),
    screen('sail-r', 'Sail right', 'projection', [2.4, 2.4], [5.2, 3.1, 1.6], -35),
    screen('bar', 'Bar front', 'led', [4, 0.75], [-7.5, 0.9, 7], 90),
    screen('stair', 'Stair tower', 'tv', [0.81, 1.44], [7.5, 2, 6], -90),
    screen('door', 'By the door', 'tv', [1.44, 0.81], [7.5, 2.1, 10], -90),
  ],
  groups: [
    { id: 'sails', name: 'Sails', screenIds: ['sail-l', 'sail-r'] },
    { id: 'front', name: 'Front', screenIds: ['back', 'sail-l', 'sail-r'] },
    { id: 'small', name: 'Small ones', screenIds: ['bar', 'stair', 'door'] },
  ],
};

/** The night from dusk to the last tram. */
export const demoPhases: readonly Omit<Phase, 'id' | 'position'>[] = [
  { name: 'Doors', colour: '#3f7fd0', startsAt: '21:00', energy: 2, brightness: 0.5, flashes: 0 },
  { name: 'Warm', colour: '#2ba89a', startsAt: '22:15', energy: 4, brightness: 0.7, flashes: 1 },
  { name: 'Build', colour: '#e0a13a', startsAt: '23:30', energy: 6, brightness: 0.85, flashes: 2 },
  { name: 'Peak', colour: '#e0574f', startsAt: '00:45', energy: 9, brightness: 1, flashes: 3 },
  { name: 'Comedown', colour: '#8a6fd1', startsAt: '03:00', energy: 3, brightness: 0.6, flashes: 1 },
];
