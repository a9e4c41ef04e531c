import { BeatLamp } from './BeatLamp';
import { refusalFor } from './refusals';
import type { Night } from './useNight';

const sources = { typed: 'tap', tap: 'tapped', 'line-in': 'line-in', midi: 'MIDI' } as const;

/** The tempo, and the place to tap it. Taps count when the finger comes down, not when it leaves. */
export const TempoDisc = ({ night, className }: { night: Night; className: string }) => {
  const { state, tapping, snapshot } = night;
  const unready = snapshot.status !== 'on' || refusalFor(snapshot.principal, 'beat.set') !== null;
  const bpm = (tapping?.bpm ?? state.beat.bpm).toFixed(1);
  const words = tapping
    ? `${tapping.taps} ${tapping.taps === 1 ? 'tap' : 'taps'}`
    : sources[state.beat.source];
  return (
    <button
      type="button"
      aria-label={`Tap the tempo, now ${bpm} beats a minute`}
      onPointerDown={(event) => night.tap(event.timeStamp)}
      onKeyDown={(event) => {
        if (event.repeat || (event.key !== 'Enter' && event.key !== ' ')) return;
        event.preventDefault();
        night.tap(event.timeStamp);
      }}
      className={`flex touch-none flex-col items-center justify-center rounded-full bg-(--raised) -outline-offset-2 outline-[3px] active:bg-(--raised-2) ${
        tapping ? 'outline-(--moonlight)' : 'outline-(--line)'
      } ${unready ? 'text-(--quiet)' : 'text-(--text)'} ${className}`}
    >
      <span className="font-mono font-semibold text-[26px] leading-7 tracking-tighter">{bpm}</span>
      <span className="text-(--quiet) text-[15px] leading-5">{words}</span>
      <BeatLamp night={night} />
    </button>
  );
};
