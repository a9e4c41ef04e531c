import type { CommandKind } from './commands';

/** Who can act. `display` holds a device token; `anyone` has neither account nor token. */
export const roles = ['lead', 'vj', 'operator', 'assistant'] as const;
export type Role = (typeof roles)[number];
export type Principal = Role | 'display' | 'anyone';

const everyone: readonly Principal[] = ['lead', 'vj', 'operator', 'assistant', 'display', 'anyone'];
const crew: readonly Principal[] = ['lead', 'vj', 'operator', 'assistant'];
const makers: readonly Principal[] = ['lead', 'vj'];
const mappers: readonly Principal[] = ['lead', 'vj', 'operator'];
const lead: readonly Principal[] = ['lead'];
const display: readonly Principal[] = ['display'];

/**
 * The one table of who may do what. Routes name an action for every path; commands use
 * `command:<kind>`; other socket messages use `message:<type>`. What is not here is refused.
 */
export const roleTable = {
  'session.read': everyone,
  'session.signIn': everyone,
  'session.signOut': everyone,
  'session.list': crew,
  'session.revoke': crew,
  'setup.read': everyone,
  'setup.finish': everyone,
  'password.forgot': everyone,
  'password.reset': everyone,
  'password.change': crew,
  'invitation.read': everyone,
  'invitation.accept': everyone,
  'invitation.make': lead,
  'invitation.revoke': lead,
  'crew.read': crew,
  'crew.changeRole': lead,
  'crew.remove': lead,
  'show.read': crew,
  'show.make': makers,
  'show.edit': makers,
  'show.open': makers,
  'show.delete': lead,
  'asRun.read': crew,
  'venue.read': crew,
  'venue.edit': mappers,
  'brand.read': crew,
  'brand.edit': makers,
  'asset.read': crew,
  'asset.upload': mappers,
  'asset.edit': makers,
  'media.read': [...crew, 'display'],
  'scene.read': crew,
  'scene.edit': makers,
  'display.read': crew,
  'display.join': mappers,
  'display.edit': mappers,
  'display.forget': mappers,
  'map.read': crew,
  'map.save': mappers,
  'pairing.ask': everyone,
  'pairing.wait': everyone,
  'display.self': display,
  'demo.make': lead,
  'mail.read': everyone,
  'health.read': everyone,
  'message:hello': [...crew, 'display'],
  'message:time': [...crew, 'display'],
  'message:command': crew,
  'message:vitals': [...crew, 'display'],
  'message:drawn': [...crew, 'display'],
  'message:picture': [...crew, 'display'],
  'command:scene.trigger': makers,
  'command:scene.recall': makers,
  'command:phase.set': makers,
  'command:beat.set': makers,
  'command:beat.nudge': makers,
  'command:beat.one': makers,
  'command:beat.scale': makers,
  'command:dimmer.set': makers,
  'command:blackout.set': crew,
  'command:calm.set': crew,
  'command:freeze.set': makers,
  'command:dial.set': makers,
  'command:lineup.set': mappers,
  'command:display.identify': crew,
  'command:display.reload': mappers,
  'command:map.draft': mappers,
} as const satisfies Record<string, readonly Principal[]> &
  Record<`command:${CommandKind}`, readonly Principal[]>;

export type Action = keyof typeof roleTable;

/** Whether a principal may do an action. */
export const may = (who: Principal, action: Action): boolean =>
  (roleTable[action] as readonly Principal[]).includes(who);
