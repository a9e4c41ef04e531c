import { useId, useState } from 'react';

interface Props {
  label: string;
  /** Hides the label from sight when a table's head says it already. */
  bare?: boolean;
  unit?: string;
  value: number;
  min: number;
  max: number;
  step?: number;
  disabled?: boolean;
  /** NaN while what is typed is no number between min and max; the text stays. */
  onChange: (value: number) => void;
}

const shown = (value: number): string =>
  Number.isFinite(value) ? String(Math.round(value * 1000) / 1000) : '';

/** A number with its unit. A number that is off stays as typed, marked, until it is mended. */
export const NumberField = ({ label, bare, unit, value, min, max, step = 1, disabled, onChange }: Props) => {
  const id = useId();
  const [typed, setTyped] = useState<string | null>(null);
  const read = (text: string) => {
    const number = text.trim() === '' ? Number.NaN : Number(text);
    return number >= min && number <= max ? number : Number.NaN;
  };
  const bad = typed !== null && Number.isNaN(read(typed));
  return (
    <div className="flex min-w-0 flex-col gap-1">
      <label htmlFor={id} className={bare ? 'sr-only' : 'text-sm text-(--quiet)'}>
        {label}
      </label>
      <span
        className={`flex items-center rounded-lg border bg-(--raised) pr-2 ${bad ? 'border-dashed border-(--coral)' : 'border-(--line)'}`}
      >
        <input
          id={id}
          type="number"
          inputMode="decimal"
          min={min}
          max={max}
          step={step}
          disabled={disabled}
          value={typed ?? shown(value)}
          aria-invalid={bad || undefined}
          title={bad ? `From ${min} to ${max}${unit ? ` ${unit}` : ''}` : undefined}
          onChange={(event) => {
            setTyped(event.target.value);
            onChange(read(event.target.value));
          }}
          onBlur={() => {
            if (!bad) setTyped(null);
          }}
          className="h-11 w-full min-w-14 rounded-lg bg-transparent px-2 font-mono text-base text-(--text)"
        />
        {unit && (
          <span aria-hidden="true" className="text-sm text-(--quiet)">
            {unit}
          </span>
        )}
      </span>
    </div>
  );
};
