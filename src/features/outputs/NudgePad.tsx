import { useEffect, useRef, useState } from 'react';
import { Segmented } from '@/components/Segmented';

interface Props {
  disabled: boolean;
  onNudge: (dx: number, dy: number) => void;
}

const steps = [0.1, 1, 10] as const;
/** First repeat after this long, then one each period. ms */
const repeat = { after: 350, each: 60 } as const;

const ways = [
  { name: 'up', sign: '↑', dx: 0, dy: -1, place: 'col-start-2 row-start-1' },
  { name: 'left', sign: '←', dx: -1, dy: 0, place: 'col-start-1 row-start-2' },
  { name: 'right', sign: '→', dx: 1, dy: 0, place: 'col-start-3 row-start-2' },
  { name: 'down', sign: '↓', dx: 0, dy: 1, place: 'col-start-2 row-start-3' },
] as const;

/** Four big arrows for a thumb: hold to repeat. */
export const NudgePad = ({ disabled, onNudge }: Props) => {
  const [step, setStep] = useState<number>(1);
  const timer = useRef<ReturnType<typeof setTimeout> | null>(null);
  const stop = () => {
    if (timer.current) clearTimeout(timer.current);
    timer.current = null;
  };
  useEffect(
    () => () => {
      if (timer.current) clearTimeout(timer.current);
    },
    [],
  );
  const newest = useRef(onNudge);
  newest.current = onNudge;
  const start = (dx: number, dy: number) => {
    const again = (wait: number) => {
      timer.current = setTimeout(() => {
        newest.current(dx, dy);
        again(repeat.each);
      }, wait);
    };
    newest.current(dx, dy);
    again(repeat.after);
  };
  return (
    <div className="flex flex-col items-center gap-3">
      <div className="grid grid-cols-3 grid-rows-3 gap-2">
        {ways.map((way) => (
          <button
            key={way.name}
            type="button"
            disabled={disabled}
            aria-label={`Move ${way.name} ${step} px`}
            className={`${way.place} h-16 w-16 touch-none select-none rounded-xl bg-(--raised-2) text-2xl text-(--text) disabled:opacity-40`}
            onPointerDown={(event) => {
              event.currentTarget.setPointerCapture(event.pointerId);
              start(way.dx * step, way.dy * step);
            }}
            onPointerUp={stop}
            onPointerCancel={stop}
            onKeyDown={(event) => {
              if (event.key === 'Enter' || event.key === ' ') onNudge(way.dx * step, way.dy * step);
            }}
          >
            {way.sign}
          </button>
        ))}
      </div>
      <Segmented
        label="Step"
        options={steps.map((one) => ({ value: String(one), label: `${one} px` }))}
        value={String(step)}
        onChange={(value) => setStep(Number(value))}
      />
    </div>
  );
};
