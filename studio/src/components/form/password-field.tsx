import { useState } from 'react';
import type { UseFormRegisterReturn } from 'react-hook-form';
import { FormField } from './form-field.tsx';

type Props = {
  label: string;
  hint?: string;
  error?: string | undefined;
  autoComplete: 'current-password' | 'new-password';
  registration: UseFormRegisterReturn;
  /** The one thing left to type. */
  autoFocus?: boolean;
};

/** A password, hidden until it is asked to be shown. */
export function PasswordField({ label, hint, error, autoComplete, registration, autoFocus }: Props) {
  const [isShown, setShown] = useState(false);
  const toggle = (
    <button
      type="button"
      className="lnk"
      aria-pressed={isShown}
      aria-label={`Show ${label.toLowerCase()}`}
      onClick={() => setShown(!isShown)}
    >
      {isShown ? 'Hide' : 'Show'}
    </button>
  );
  return (
    <FormField label={label} error={error} beside={toggle} {...(hint ? { hint } : {})}>
      <input
        type={isShown ? 'text' : 'password'}
        autoComplete={autoComplete}
        autoCapitalize="none"
        spellCheck={false}
        autoFocus={autoFocus}
        {...registration}
      />
    </FormField>
  );
}

/** The rule of a new password, said beforehand. */
export const PASSWORD_RULE = 'At least 10 characters. A few words in a row are easy to keep in mind.';
