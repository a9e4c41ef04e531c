import { type ChangeEvent, useState } from 'react';
import { Field } from '@/components/Field';
import { passwordStrength } from './passwordStrength';

interface Props {
  label: string;
  name: string;
  value: string;
  error: string | null;
  onChange: (event: ChangeEvent<HTMLInputElement>) => void;
  /** A new password says how strong it is. */
  fresh?: boolean;
}

/** A password that can be shown while it is typed. */
export const PasswordField = ({ label, fresh = false, ...rest }: Props) => {
  const [shown, setShown] = useState(false);
  return (
    <div className="relative">
      <Field
        label={label}
        type={shown ? 'text' : 'password'}
        autoComplete={fresh ? 'new-password' : 'current-password'}
        hint={fresh ? passwordStrength(rest.value) : undefined}
        required
        {...rest}
      />
      <button
        type="button"
        aria-pressed={shown}
        onClick={() => setShown(!shown)}
        className="absolute top-0 right-0 min-h-6 px-1 text-sm text-(--quiet) underline"
      >
        {shown ? 'Hide' : 'Show'}
      </button>
    </div>
  );
};
