/** What the hand feels, in ms on, off, on … (our choice: short for done, broken for no). */
const buzzes = {
  tap: [12],
  taken: [25],
  refused: [40, 60, 40],
} as const;
export type Buzz = keyof typeof buzzes;

/** Buzzes where the phone can (not on iOS, not before the first touch); silent otherwise. */
export const vibrate = (buzz: Buzz): void => {
  if (typeof navigator === 'undefined' || typeof navigator.vibrate !== 'function') return;
  navigator.vibrate([...buzzes[buzz]]);
};
