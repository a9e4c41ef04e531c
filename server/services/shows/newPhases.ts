import type { Phase } from '#shared/api/shows';
import { newId } from '../tokens';

/** The night that a new show starts with. Hours and levels are ours: starting points, to be changed on Plan. */
const usual: readonly Omit<Phase, 'id' | 'position'>[] = [
  { name: 'Doors', colour: '#3f7fd0', startsAt: '21:00', energy: 2, brightness: 0.5, flashes: 0 },
  { name: 'Warm', colour: '#2ba89a', startsAt: '22:00', energy: 4, brightness: 0.7, flashes: 1 },
  { name: 'Build', colour: '#e0a13a', startsAt: '23:30', energy: 6, brightness: 0.85, flashes: 2 },
  { name: 'Peak', colour: '#e0574f', startsAt: '00:45', energy: 9, brightness: 1, flashes: 3 },
  { name: 'Comedown', colour: '#8a6fd1', startsAt: '03:00', energy: 3, brightness: 0.6, flashes: 1 },
];

/** Phases of a new show, with ids of their own. */
export const newPhases = (): Phase[] => usual.map((phase, position) => ({ ...phase, id: newId(), position }));
