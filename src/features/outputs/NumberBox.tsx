import { useId, useState } from 'react';

interface Props {
  label: string;
  unit: string;
  value: number;
  min?: number;
  max?: number;
  step: number;
  onChange: (value: number) => void;
}

const shown = (value: number): string => String(Math.round(value * 100) / 100);

/** A number with its unit. What is typed stays while it is typed; only whole, allowed numbers go out. */
export const NumberBox = ({ label, unit, value, min = -20_000, max = 20_000, step, onChange }: Props) => {
  const id = useId();
  const [typed, setTyped] = useState<string | null>(null);
  const bad = typed !== null && !(Number(typed) >= min && Number(typed) <= max && typed.trim() !== '');
  return (
    <label htmlFor={id} className="flex flex-col gap-1 text-sm text-(--quiet)">
      {label}
      <span className="flex items-center rounded-lg border border-(--line) bg-(--raised-2) pr-2">
        <input
          id={id}
          type="number"
          inputMode="decimal"
          step={step}
          min={min}
          max={max}
          value={typed ?? shown(value)}
          aria-invalid={bad}
          onChange={(event) => {
            const text = event.target.value;
            setTyped(text);
            const number = Number(text);
            if (text.trim() !== '' && number >= min && number <= max) onChange(number);
          }}
          onBlur={() => setTyped(null)}
          className="h-11 w-full min-w-0 bg-transparent px-3 font-mono text-base text-(--text) outline-none"
        />
        <span aria-hidden="true">{unit}</span>
      </span>
    </label>
  );
};
