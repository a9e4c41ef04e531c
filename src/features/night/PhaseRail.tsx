import { useEffect, useRef } from 'react';
import type { Night } from './useNight';

interface Props {
  night: Night;
  /** Down the side of a phone, or across a laptop. */
  across?: boolean;
}

/** The parts of the night, dusk to dawn. A tap looks at a phase; the night's own phase carries a disc. */
export const PhaseRail = ({ night, across = false }: Props) => {
  const here = useRef<HTMLButtonElement>(null);
  const { phase, state, choices } = night;
  const lookedAt = phase?.id;
  useEffect(() => {
    // A page that has just loaded shows the phase that it is in.
    if (lookedAt) here.current?.scrollIntoView?.({ block: 'nearest', inline: 'nearest' });
  }, [lookedAt]);
  return (
    <nav
      aria-label="Phases"
      className={
        across
          ? 'flex flex-wrap gap-2'
          : 'flex w-27 shrink-0 flex-col gap-2 overflow-y-auto overscroll-contain [scrollbar-width:none]'
      }
    >
      {night.show.phases.map(({ id, name, colour }) => (
        <button
          key={id}
          type="button"
          ref={id === phase?.id ? here : null}
          aria-pressed={id === phase?.id}
          aria-label={id === state.phaseId ? `${name}, the night is here` : name}
          onClick={() => night.setChoices({ ...choices, phaseId: id })}
          className={`flex min-h-15 items-center justify-between gap-1 rounded-xl px-2.5 text-left text-[18px] leading-5 ${
            across ? 'flex-1 border-t-[6px]' : 'flex-[1_0_auto] border-l-[6px]'
          } ${id === phase?.id ? 'bg-(--raised-2) font-bold text-(--text)' : 'bg-(--raised) text-(--quiet)'}`}
          style={{ borderColor: colour }}
        >
          {name}
          {id === state.phaseId ? (
            <span className="size-2.5 shrink-0 rounded-full" style={{ background: colour }} />
          ) : null}
        </button>
      ))}
    </nav>
  );
};
