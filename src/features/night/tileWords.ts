import type { TileState } from './tileState';

/** “in 3 beats”, “in 1 beat”, “now”: whole beats that are still to come. */
export const beatsWords = (beatsLeft: number): string => {
  const whole = Math.ceil(beatsLeft - 1e-6);
  if (whole <= 0) return 'now';
  return whole === 1 ? 'in 1 beat' : `in ${whole} beats`;
};

/** Badges of a tile, one line each. The kind decides shape and colour, so that no two states look alike. */
export interface Badge {
  kind: 'asking' | 'sent' | 'landing' | 'on' | 'look';
  words: string;
  /** Share of the waiting that is over, 0..1; only for `sent`. */
  share?: number;
}

const wallWords = ({ on, of }: TileState): string => (on < of ? `on ${on} of ${of}` : 'on');

/** Beats that a full ring stands for when the tile does not know how long the whole wait was. */
const ringBeats = 16;

/**
 * Badges of a tile. `asking`: this page has asked and the hub has not answered.
 * @param waitBeats beats from asking to landing, for the ring
 */
export const badges = (state: TileState, asking: boolean, waitBeats = ringBeats): Badge[] => {
  const list: Badge[] = [];
  if (state.sent)
    list.push({
      kind: 'sent',
      words: beatsWords(state.sent.beatsLeft),
      share: Math.min(1, Math.max(0, 1 - state.sent.beatsLeft / Math.max(waitBeats, 1e-6))),
    });
  else if (asking) list.push({ kind: 'asking', words: 'sending' });
  else if (state.landing && state.on === 0) list.push({ kind: 'landing', words: 'landing' });
  if (state.on > 0) list.push({ kind: state.missing ? 'look' : 'on', words: wallWords(state) });
  else if (state.missing) list.push({ kind: 'look', words: 'not drawn' });
  else if (state.unfed) list.push({ kind: 'look', words: 'no display' });
  return list;
};
