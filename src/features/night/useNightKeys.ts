import { useEffect, useRef } from 'react';
import { landings } from './choices';
import { belongsElsewhere, type KeyDeed, meaningOf } from './keys';
import type { Night } from './useNight';

const dimmerStep = 0.05;

const turnPhase = (night: Night, by: 1 | -1): void => {
  const { phases } = night.show;
  const here = phases.findIndex(({ id }) => id === night.phase?.id);
  const next = phases[here + by];
  if (next) night.setChoices({ ...night.choices, phaseId: next.id });
};

const land = (night: Night, place: number): void => {
  const landsOn = landings[place];
  if (landsOn) night.setChoices({ ...night.choices, landsOn });
};

/** Everything that was sent and has not landed, on any screen. */
const takeBack = (night: Night): void =>
  night.recall(
    Object.entries(night.state.screens)
      .filter(([, { next }]) => next !== null && next.landsAt > night.now)
      .map(([screenId]) => screenId),
  );

type Deeds = Record<Exclude<KeyDeed, 'help' | 'close'>, (night: Night, at: number) => void>;

const deeds: Deeds = {
  tap: (night, at) => night.tap(at),
  one: (night) => night.theOne(),
  later: (night) => night.nudge(10),
  earlier: (night) => night.nudge(-10),
  blackout: (night) => night.turn('blackout', !night.state.blackout.on),
  calm: (night) => night.turn('calm', !night.state.calm.on),
  freeze: (night) => night.turn('freeze', !night.state.freeze.on),
  recall: takeBack,
  all: (night) => night.setChoices({ ...night.choices, screenIds: null }),
  phaseBefore: (night) => turnPhase(night, -1),
  phaseAfter: (night) => turnPhase(night, 1),
  brighter: (night) => night.setLevel(night.level + dimmerStep),
  darker: (night) => night.setLevel(night.level - dimmerStep),
  landNow: (night) => land(night, 0),
  landBeat: (night) => land(night, 1),
  landBar: (night) => land(night, 2),
  landFour: (night) => land(night, 3),
};

/** Listens for the keys of Live while mounted. `onHelp` gets true for `?`, false for Escape. */
export const useNightKeys = (night: Night, onHelp: (wanted: 'toggle' | 'close') => void): void => {
  const latest = useRef({ night, onHelp });
  latest.current = { night, onHelp };
  useEffect(() => {
    const press = (event: KeyboardEvent) => {
      if (belongsElsewhere(event)) return;
      const meaning = meaningOf(event.key);
      if (!meaning) return;
      event.preventDefault();
      const { night: now, onHelp: help } = latest.current;
      if ('scene' in meaning) {
        const tile = now.tiles[meaning.scene];
        if (tile) now.press(tile.scene.id, tile.tile);
      } else if (meaning.deed === 'help') help('toggle');
      else if (meaning.deed === 'close') help('close');
      else deeds[meaning.deed](now, event.timeStamp);
    };
    // A button clicked by mouse must not keep the focus: the next space would press it instead of tapping the tempo.
    const letGo = () => {
      const { activeElement } = document;
      if (activeElement instanceof HTMLButtonElement && !activeElement.matches(':focus-visible'))
        activeElement.blur();
    };
    window.addEventListener('keydown', press);
    window.addEventListener('pointerup', letGo);
    return () => {
      window.removeEventListener('keydown', press);
      window.removeEventListener('pointerup', letGo);
    };
  }, []);
};
