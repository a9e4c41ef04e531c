import type { CommandKind } from '#shared/show/commands';
import { may, type Principal } from '#shared/show/roles';

/** Why a role may not, in five words; the hub would say no as well, this only saves the tap. */
const reasons: Partial<Record<CommandKind, string>> = {
  'scene.trigger': 'Only lead and VJ fire',
  'scene.recall': 'Only lead and VJ fire',
  'phase.set': 'Only lead and VJ lead',
  'dimmer.set': 'Only lead and VJ dim',
  'freeze.set': 'Only lead and VJ freeze',
  'dial.set': 'Only lead and VJ turn',
};
const beatReason = 'Only lead and VJ tap';

/** Five words when `who` may not send `kind`; null when they may. */
export const refusalFor = (who: Principal | null, kind: CommandKind): string | null => {
  if (who === null || may(who, `command:${kind}`)) return null;
  return reasons[kind] ?? (kind.startsWith('beat.') ? beatReason : 'Not for your role tonight');
};
