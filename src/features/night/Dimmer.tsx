import { type KeyboardEvent, type PointerEvent, useRef } from 'react';
import { refusalFor } from './refusals';
import type { Night } from './useNight';

const keySteps: Readonly<Record<string, number>> = {
  ArrowUp: 0.05,
  ArrowRight: 0.05,
  ArrowDown: -0.05,
  ArrowLeft: -0.05,
  PageUp: 0.2,
  PageDown: -0.2,
};

/**
 * The overall level as a tall bar. A thumb drags it from where it is: touching never makes the light jump.
 */
export const Dimmer = ({ night, className }: { night: Night; className: string }) => {
  const grip = useRef<{ y: number; level: number; height: number } | null>(null);
  const { level, setLevel, snapshot } = night;
  const unready = snapshot.status !== 'on' || refusalFor(snapshot.principal, 'dimmer.set') !== null;
  const percent = Math.round(level * 100);

  const take = (event: PointerEvent<HTMLDivElement>) => {
    // A refused hand gets its reason once a touch, not twenty a second.
    if (unready) return setLevel(level);
    event.currentTarget.setPointerCapture(event.pointerId);
    grip.current = { y: event.clientY, level, height: event.currentTarget.clientHeight };
  };
  const move = (event: PointerEvent) => {
    const held = grip.current;
    if (held && held.height > 0) setLevel(held.level + (held.y - event.clientY) / held.height);
  };
  const letGo = () => {
    grip.current = null;
  };
  const key = (event: KeyboardEvent) => {
    const step = keySteps[event.key];
    const ends = { Home: 0, End: 1 } as Readonly<Record<string, number>>;
    const wanted = step === undefined ? ends[event.key] : level + step;
    if (wanted === undefined) return;
    event.preventDefault();
    event.stopPropagation();
    setLevel(wanted);
  };
  return (
    <div
      role="slider"
      tabIndex={0}
      aria-label="Dimmer"
      aria-orientation="vertical"
      aria-valuemin={0}
      aria-valuemax={100}
      aria-valuenow={percent}
      aria-valuetext={`${percent} %`}
      aria-disabled={unready || undefined}
      onPointerDown={take}
      onPointerMove={move}
      onPointerUp={letGo}
      onPointerCancel={letGo}
      onKeyDown={key}
      className={`relative touch-none overflow-hidden rounded-2xl bg-(--raised-2) ${unready ? 'opacity-50' : ''} ${className}`}
    >
      <div
        className="absolute inset-x-0 bottom-0 bg-(--firefly) opacity-80"
        style={{ height: `${percent}%` }}
      />
      <span className="absolute inset-x-1 bottom-1.5 rounded-lg bg-black/75 text-center font-mono font-semibold text-(--text) text-[18px]">
        {percent} %
      </span>
      <span className="absolute inset-x-1 top-1.5 rounded-lg bg-black/60 text-center text-(--text) text-[15px]">
        Dimmer
      </span>
    </div>
  );
};
