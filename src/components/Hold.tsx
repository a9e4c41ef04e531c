import { useEffect, useRef, useState } from 'react';

interface Props {
  label: string;
  /** How long to hold, ms. */
  ms?: number;
  onHeld: () => void;
  disabled?: boolean;
  className?: string;
}

/** For acts that hurt: works only when held. A shorter press does nothing and says what to do. */
export const Hold = ({ label, ms = 600, onHeld, disabled, className = '' }: Props) => {
  const [holding, setHolding] = useState(false);
  const timer = useRef<ReturnType<typeof setTimeout> | null>(null);
  const stop = () => {
    if (timer.current) clearTimeout(timer.current);
    timer.current = null;
    setHolding(false);
  };
  useEffect(
    () => () => {
      if (timer.current) clearTimeout(timer.current);
    },
    [],
  );
  const start = () => {
    if (timer.current || disabled) return;
    setHolding(true);
    timer.current = setTimeout(() => {
      stop();
      onHeld();
    }, ms);
  };
  return (
    <button
      type="button"
      disabled={disabled}
      onPointerDown={start}
      onPointerUp={stop}
      onPointerLeave={stop}
      onPointerCancel={stop}
      onKeyDown={(event) => {
        if (event.key === 'Enter' || event.key === ' ') start();
      }}
      onKeyUp={stop}
      onContextMenu={(event) => event.preventDefault()}
      className={`relative min-h-11 touch-none overflow-hidden rounded-lg border border-(--coral) px-4 py-2 font-bold text-(--coral) select-none disabled:opacity-45 ${className}`}
    >
      <span
        aria-hidden="true"
        className="absolute inset-y-0 left-0 bg-(--coral) opacity-25"
        style={{ width: holding ? '100%' : '0%', transition: holding ? `width ${ms}ms linear` : 'none' }}
      />
      <span className="relative">{label}</span>
    </button>
  );
};
