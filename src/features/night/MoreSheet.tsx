import { type ReactNode, useEffect, useRef } from 'react';
import { BeatTools } from './BeatTools';
import { Dials } from './Dials';
import type { Night } from './useNight';

interface Props {
  night: Night;
  onClose: () => void;
  /** The way out of the night, such as a link to the plan. */
  leave: ReactNode;
}

const Hands = ({ night }: { night: Night }) => (
  <fieldset aria-label="Hand" className="grid grid-cols-2 gap-2">
    {(['left', 'right'] as const).map((hand) => (
      <button
        key={hand}
        type="button"
        aria-pressed={night.choices.hand === hand}
        onClick={() => night.setChoices({ ...night.choices, hand })}
        className={`h-15 rounded-2xl font-semibold text-[18px] ${
          night.choices.hand === hand
            ? 'bg-(--raised-3) outline-2 outline-(--quiet)'
            : 'bg-(--raised-2) text-(--quiet)'
        }`}
      >
        {hand === 'left' ? 'Left hand' : 'Right hand'}
      </button>
    ))}
  </fieldset>
);

/** Rarer things over the tiles. Calm, blackout and the dimmer stay where they are, below it. */
export const MoreSheet = ({ night, onClose, leave }: Props) => {
  const sheet = useRef<HTMLElement>(null);
  useEffect(() => sheet.current?.focus(), []);
  return (
    <section
      ref={sheet}
      tabIndex={-1}
      aria-label="More"
      onKeyDown={(event) => {
        if (event.key === 'Escape') onClose();
      }}
      className="absolute inset-0 z-10 flex flex-col gap-4 overflow-y-auto overscroll-contain rounded-2xl bg-(--raised) p-3 outline-none"
    >
      <BeatTools night={night} />
      <Dials night={night} />
      <Hands night={night} />
      <div className="mt-auto grid grid-cols-2 gap-2">
        {leave}
        <button
          type="button"
          onClick={onClose}
          className="h-15 rounded-2xl bg-(--raised-2) font-semibold text-[18px] active:bg-(--raised-3)"
        >
          Close
        </button>
      </div>
    </section>
  );
};
