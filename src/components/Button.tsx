import type { ButtonHTMLAttributes } from 'react';

const looks = {
  primary: 'bg-(--firefly) text-(--on-firefly) hover:brightness-95',
  quiet:
    'bg-(--raised-2) text-(--text) hover:bg-(--raised-3) aria-pressed:bg-(--text) aria-pressed:text-(--ground)',
  danger: 'bg-transparent text-(--coral) border border-(--coral) hover:bg-(--raised-2)',
} as const;

interface Props extends ButtonHTMLAttributes<HTMLButtonElement> {
  variant?: keyof typeof looks;
}

/** A button of 44 px or more. `quiet` shows aria-pressed. */
export const Button = ({ variant = 'quiet', type = 'button', className = '', ...rest }: Props) => (
  <button
    type={type}
    className={`min-h-11 rounded-lg px-4 py-2 font-bold disabled:opacity-45 ${looks[variant]} ${className}`}
    {...rest}
  />
);
