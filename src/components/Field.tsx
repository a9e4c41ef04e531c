import { type InputHTMLAttributes, useId } from 'react';

interface Props extends InputHTMLAttributes<HTMLInputElement> {
  label: string;
  /** What is wrong with it, in a sentence. */
  error?: string | null;
  hint?: string;
}

/** One line of text with its label, hint and fault. */
export const Field = ({ label, error, hint, className = '', id, ...rest }: Props) => {
  const made = useId();
  const inputId = id ?? made;
  const describes = error ? `${inputId}-error` : hint ? `${inputId}-hint` : undefined;
  return (
    <div className={`flex min-w-0 flex-1 flex-col gap-1 ${className}`}>
      <label htmlFor={inputId} className="text-sm text-(--quiet)">
        {label}
      </label>
      <input
        id={inputId}
        aria-invalid={error ? true : undefined}
        aria-describedby={describes}
        className="h-11 w-full rounded-lg border border-(--line) bg-(--raised) px-3 text-base text-(--text) aria-invalid:border-(--coral)"
        {...rest}
      />
      {error ? (
        <p id={`${inputId}-error`} className="text-sm text-(--coral)">
          {error}
        </p>
      ) : (
        hint && (
          <p id={`${inputId}-hint`} className="text-sm text-(--quiet)">
            {hint}
          </p>
        )
      )}
    </div>
  );
};
