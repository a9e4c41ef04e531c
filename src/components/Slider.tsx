import { useId } from 'react';

interface Props {
  label: string;
  value: number;
  min: number;
  max: number;
  step: number;
  unit?: string;
  onChange: (value: number) => void;
  disabled?: boolean;
}

/** A number between two ends, with its unit. */
export const Slider = ({ label, value, min, max, step, unit, onChange, disabled }: Props) => {
  const id = useId();
  return (
    <div className="flex items-center gap-3">
      <label htmlFor={id} className="w-28 shrink-0 text-sm text-(--quiet)">
        {label}
      </label>
      <input
        id={id}
        type="range"
        min={min}
        max={max}
        step={step}
        value={value}
        disabled={disabled}
        onChange={(event) => onChange(Number(event.target.value))}
        className="h-11 min-w-0 flex-1 accent-(--text)"
      />
      <output htmlFor={id} className="w-16 shrink-0 text-right font-mono text-sm">
        {Math.round(value * 1000) / 1000}
        {unit && ` ${unit}`}
      </output>
    </div>
  );
};
