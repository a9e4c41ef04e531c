import type { LandsOn } from '#shared/show/commands';

/** Every way of landing, in the order of the buttons. */
export const landings = ['now', 'beat', 'bar', '4 bars'] as const satisfies readonly LandsOn[];

/** What a hand has chosen on one phone or laptop. Kept there, so that a reload changes nothing. */
export interface Choices {
  /** Phase whose scenes are looked at; null follows the phase of the night. */
  phaseId: string | null;
  /** Screens that a tap fires on; null means all, also those that are added later. */
  screenIds: readonly string[] | null;
  landsOn: LandsOn;
  /** Hand that holds the phone; the controls lie under its thumb. */
  hand: 'left' | 'right';
}

export const firstChoices: Choices = { phaseId: null, screenIds: null, landsOn: 'bar', hand: 'right' };

const isTexts = (value: unknown): boolean =>
  Array.isArray(value) && value.every((item) => typeof item === 'string');

/** Checks what was stored by an older page. */
export const isChoices = (value: unknown): value is Choices => {
  if (typeof value !== 'object' || value === null) return false;
  const { phaseId, screenIds, landsOn, hand } = value as Record<string, unknown>;
  return (
    (phaseId === null || typeof phaseId === 'string') &&
    (screenIds === null || isTexts(screenIds)) &&
    (landings as readonly unknown[]).includes(landsOn) &&
    (hand === 'left' || hand === 'right')
  );
};

/** The chosen screens that exist, in the room's order; all of them when nothing valid is chosen. */
export const chosenScreens = (chosen: Choices['screenIds'], all: readonly string[]): readonly string[] => {
  const left = all.filter((id) => chosen?.includes(id));
  return left.length > 0 ? left : all;
};

/**
 * Choosing by tap. From “all” a tap picks just those screens; further taps add; a tap on what is fully chosen takes it
 * away; nothing left, or every screen, is “all” again. Null means all.
 */
export const toggleScreens = (
  chosen: Choices['screenIds'],
  tapped: readonly string[],
  all: readonly string[],
): Choices['screenIds'] => {
  const before = all.filter((id) => chosen?.includes(id));
  const wasIn = before.length > 0 && tapped.every((id) => before.includes(id));
  const after = wasIn
    ? before.filter((id) => !tapped.includes(id))
    : all.filter((id) => before.includes(id) || tapped.includes(id));
  return after.length === 0 || after.length === all.length ? null : after;
};
