/** What a key does on Live. Scene keys carry the place of the tile in its phase. */
export type KeyDeed =
  | 'tap'
  | 'one'
  | 'later'
  | 'earlier'
  | 'blackout'
  | 'calm'
  | 'freeze'
  | 'recall'
  | 'all'
  | 'phaseBefore'
  | 'phaseAfter'
  | 'brighter'
  | 'darker'
  | 'landNow'
  | 'landBeat'
  | 'landBar'
  | 'landFour'
  | 'help'
  | 'close';

interface Key {
  /** `KeyboardEvent.key`, lower case. */
  key: string;
  deed: KeyDeed;
  /** As printed on the page. */
  cap: string;
  words: string;
}

/** The one table of keys; the help sheet prints it. Digits 1–9 and 0 fire the ten first scenes of the phase. */
export const keyTable: readonly Key[] = [
  { key: ' ', deed: 'tap', cap: 'Space', words: 'Tap the tempo' },
  { key: 'enter', deed: 'one', cap: 'Enter', words: 'This is the one' },
  { key: '[', deed: 'earlier', cap: '[', words: 'Beat 10 ms earlier' },
  { key: ']', deed: 'later', cap: ']', words: 'Beat 10 ms later' },
  { key: 'n', deed: 'landNow', cap: 'N', words: 'Land now' },
  { key: 't', deed: 'landBeat', cap: 'T', words: 'Land on the beat' },
  { key: 'r', deed: 'landBar', cap: 'R', words: 'Land on the bar' },
  { key: 'g', deed: 'landFour', cap: 'G', words: 'Land on 4 bars' },
  { key: 'arrowleft', deed: 'phaseBefore', cap: '←', words: 'Look at the phase before' },
  { key: 'arrowright', deed: 'phaseAfter', cap: '→', words: 'Look at the phase after' },
  { key: 'arrowup', deed: 'brighter', cap: '↑', words: 'Dimmer 5 % up' },
  { key: 'arrowdown', deed: 'darker', cap: '↓', words: 'Dimmer 5 % down' },
  { key: 'backspace', deed: 'recall', cap: '⌫', words: 'Take back what was sent' },
  { key: 'a', deed: 'all', cap: 'A', words: 'Choose all screens' },
  { key: 'f', deed: 'freeze', cap: 'F', words: 'Freeze and back' },
  { key: 'c', deed: 'calm', cap: 'C', words: 'Calm and back' },
  { key: 'b', deed: 'blackout', cap: 'B', words: 'Blackout and back' },
  { key: '?', deed: 'help', cap: '?', words: 'These keys' },
  { key: 'escape', deed: 'close', cap: 'Esc', words: 'Close this' },
];

/** Digit printed on the tile at `place` (0-based); null past the tenth. */
export const digitOf = (place: number): string | null => (place < 10 ? String((place + 1) % 10) : null);

/** What a press means: a scene's place, a deed, or nothing. Pure. */
export const meaningOf = (key: string): { scene: number } | { deed: KeyDeed } | null => {
  if (/^\d$/.test(key)) return { scene: (Number(key) + 9) % 10 };
  const found = keyTable.find((row) => row.key === key.toLowerCase());
  return found ? { deed: found.deed } : null;
};

const typing =
  'input:not([type=range]):not([type=checkbox]):not([type=radio]), textarea, select, [contenteditable]';
const ownKeys: Readonly<Record<string, string>> = {
  ' ': 'button, a, summary, [role=button], [role=slider], input',
  enter: 'button, a, summary, [role=button]',
  arrowup: 'input, [role=slider], [role=radio]',
  arrowdown: 'input, [role=slider], [role=radio]',
  arrowleft: 'input, [role=slider], [role=radio]',
  arrowright: 'input, [role=slider], [role=radio]',
};

/**
 * Whether a press belongs to what has the focus: text being typed, a button that Enter or space would press, a slider
 * that arrows move, or a browser's own shortcut. Such a press never fires anything.
 */
export const belongsElsewhere = (event: KeyboardEvent): boolean => {
  if (event.ctrlKey || event.metaKey || event.altKey || event.repeat || event.isComposing) return true;
  const target = event.target instanceof Element ? event.target : null;
  if (!target) return false;
  if (target.closest(typing)) return true;
  const own = ownKeys[event.key.toLowerCase()];
  return own !== undefined && target.closest(own) !== null;
};
