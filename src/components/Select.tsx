import { type SelectHTMLAttributes, useId } from 'react';

interface Props extends SelectHTMLAttributes<HTMLSelectElement> {
  label: string;
  options: readonly { value: string; label: string }[];
}

/** A choice of one out of a list. */
export const Select = ({ label, options, className = '', id, ...rest }: Props) => {
  const made = useId();
  return (
    <div className={`flex min-w-0 flex-col gap-1 ${className}`}>
      <label htmlFor={id ?? made} className="text-sm text-(--quiet)">
        {label}
      </label>
      <select
        id={id ?? made}
        className="h-11 rounded-lg border border-(--line) bg-(--raised) px-3 text-base text-(--text)"
        {...rest}
      >
        {options.map((option) => (
          <option key={option.value} value={option.value}>
            {option.label}
          </option>
        ))}
      </select>
    </div>
  );
};
