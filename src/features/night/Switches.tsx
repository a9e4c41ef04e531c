import { refusalFor } from './refusals';
import type { Night } from './useNight';
import type { SwitchName } from './useNightActions';

interface Face {
  off: string;
  on: string;
  /** What the way back does, in small. */
  back: string;
  offLook: string;
  onLook: string;
}

/** Each is one tap, and so is the way back; all three lie over the state, so restore gives the very state before. */
const faces: Record<SwitchName, Face> = {
  freeze: {
    off: 'Freeze',
    on: 'Let go',
    back: 'frozen',
    offLook: 'bg-(--raised-2) text-(--text)',
    onLook: 'bg-(--amber) text-black',
  },
  calm: {
    off: 'Calm',
    on: 'Restore',
    back: 'calm is on',
    offLook: 'bg-(--raised-2) text-(--text)',
    onLook: 'bg-(--amber) text-black',
  },
  blackout: {
    off: 'Blackout',
    on: 'Restore',
    back: 'blackout is on',
    offLook: 'bg-(--coral)/15 text-(--coral)',
    onLook: 'bg-(--coral) text-black',
  },
};

/** Freeze, calm or blackout: says what a tap will do, and is loud while it is on. */
export const SwitchButton = ({
  night,
  name,
  className,
  cap,
}: {
  night: Night;
  name: SwitchName;
  className: string;
  cap?: string;
}) => {
  const face = faces[name];
  const { on } = night.state[name];
  const asked = night.asking.has(name);
  const unready =
    night.snapshot.status !== 'on' || refusalFor(night.snapshot.principal, `${name}.set`) !== null;
  return (
    <button
      type="button"
      aria-pressed={on}
      aria-disabled={unready || undefined}
      aria-label={on ? `${face.on}: ${face.back}` : face.off}
      onClick={() => night.turn(name, !on)}
      className={`relative flex flex-col items-center justify-center rounded-2xl px-1 font-bold text-[18px] leading-5 active:brightness-125 ${
        on ? face.onLook : face.offLook
      } ${unready ? 'opacity-45' : ''} ${className}`}
    >
      {on ? face.on : face.off}
      {on ? <span className="font-semibold text-[15px]">{face.back}</span> : null}
      {asked ? <span className="absolute inset-x-4 bottom-1.5 h-0.5 rounded bg-current" /> : null}
      {cap ? <kbd className="absolute top-1.5 right-2 font-mono text-[13px] opacity-70">{cap}</kbd> : null}
    </button>
  );
};
