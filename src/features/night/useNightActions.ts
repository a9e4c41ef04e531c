import { useMemo } from 'react';
import type { CommandBody, LandsOn } from '#shared/show/commands';
import type { ShowLink } from '@/link/types';
import type { TileState } from './tileState';
import { useDimmer } from './useDimmer';
import type { Notice } from './useNotice';
import { type Sender, useSend } from './useSend';
import { type Tapping, useTapTempo } from './useTapTempo';

export type SwitchName = 'blackout' | 'calm' | 'freeze';

/** What a hand can do to the night. */
export interface NightActions {
  /** Keys of what has been asked and not answered: scene ids, `blackout`, `beat` … */
  asking: ReadonlySet<string>;
  /** Fires a scene on the chosen screens, or takes it back where it was sent and has not landed. */
  press: (sceneId: string, tile: TileState) => void;
  /** Takes back everything that was sent and has not landed on these screens. */
  recall: (screenIds: readonly string[]) => void;
  startPhase: (phaseId: string) => void;
  turn: (name: SwitchName, on: boolean) => void;
  tapping: Tapping | null;
  tap: (performanceMs: number) => void;
  nudge: (ms: number) => void;
  scale: (factor: 2 | 0.5) => void;
  theOne: () => void;
  level: number;
  setLevel: (level: number) => void;
  setDial: (screenIds: readonly string[], dial: number, value: number) => void;
}

const makeActions = (link: ShowLink, send: Sender['send'], chosen: readonly string[], landsOn: LandsOn) => {
  const fire = (key: string, body: CommandBody) => void send(key, body);
  return {
    press: (sceneId: string, tile: TileState) =>
      tile.sent
        ? fire(sceneId, { kind: 'scene.recall', screenIds: [...tile.sent.screenIds] })
        : fire(sceneId, { kind: 'scene.trigger', screenIds: [...chosen], sceneId, landsOn }),
    recall: (screenIds: readonly string[]) => {
      if (screenIds.length > 0) fire('recall', { kind: 'scene.recall', screenIds: [...screenIds] });
    },
    startPhase: (phaseId: string) => fire('phase', { kind: 'phase.set', phaseId }),
    turn: (name: SwitchName, on: boolean) => fire(name, { kind: `${name}.set`, on }),
    nudge: (ms: number) => fire('beat', { kind: 'beat.nudge', ms }),
    scale: (factor: 2 | 0.5) => fire('beat', { kind: 'beat.scale', factor }),
    theOne: () => fire('beat', { kind: 'beat.one', at: link.hubNow() }),
    setDial: (screenIds: readonly string[], dial: number, value: number) =>
      void send(`dial${dial}`, { kind: 'dial.set', screenIds: [...screenIds], dial, value }, true),
  };
};

/** The deeds of a hand on one link, for the screens it has chosen. */
export const useNightActions = (
  link: ShowLink,
  hubLevel: number,
  chosen: readonly string[],
  landsOn: LandsOn,
  tell: (kind: Notice['kind'], words: string) => void,
): NightActions => {
  const { send, asking } = useSend(link, tell);
  const { tapping, tap } = useTapTempo(link, send);
  const { level, setLevel } = useDimmer(hubLevel, send);
  const deeds = useMemo(() => makeActions(link, send, chosen, landsOn), [link, send, chosen, landsOn]);
  return { ...deeds, asking, tapping, tap, level, setLevel };
};
