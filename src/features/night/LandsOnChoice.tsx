import { landings } from './choices';
import type { Night } from './useNight';

/** Where the next trigger lands. */
export const LandsOnChoice = ({ night }: { night: Night }) => (
  <fieldset aria-label="Lands on" className="grid grid-cols-4 gap-1 rounded-2xl bg-(--raised) p-1">
    {landings.map((landsOn) => (
      <button
        key={landsOn}
        type="button"
        aria-pressed={night.choices.landsOn === landsOn}
        onClick={() => night.setChoices({ ...night.choices, landsOn })}
        className={`h-15 rounded-xl font-semibold text-[18px] ${
          night.choices.landsOn === landsOn
            ? 'bg-(--raised-2) text-(--text) outline-2 outline-(--quiet) -outline-offset-2'
            : 'text-(--quiet)'
        }`}
      >
        {landsOn}
      </button>
    ))}
  </fieldset>
);
