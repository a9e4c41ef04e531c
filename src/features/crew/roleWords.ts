import type { Action, Role } from '#shared/show/roles';

/** What each role is for, in a line. */
export const roleWords: Record<Role, string> = {
  lead: 'owns the crew',
  vj: 'makes and runs shows',
  operator: 'joins and maps displays',
  assistant: 'watches, and may calm',
};

/** The acts that people ask about, each with the row of the one role table that decides it. */
export const actWords: readonly { act: string; action: Action }[] = [
  { act: 'See shows, scenes and displays', action: 'show.read' },
  { act: 'Calm and blackout', action: 'command:calm.set' },
  { act: 'Upload files', action: 'asset.upload' },
  { act: 'Join and map displays', action: 'map.save' },
  { act: 'Make scenes', action: 'scene.edit' },
  { act: 'Fire scenes, set tempo and level', action: 'command:scene.trigger' },
  { act: 'Open and close a show', action: 'show.open' },
  { act: 'Delete a show', action: 'show.delete' },
  { act: 'Invite people and give roles', action: 'invitation.make' },
];
