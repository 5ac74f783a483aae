import { zodResolver } from '@hookform/resolvers/zod';
import type { ReactNode } from 'react';
import { useForm } from 'react-hook-form';
import { z } from 'zod';
import { accountEndpoints } from '../../../../../server/src/contract/account.ts';
import { FormField } from '../../../components/form/form-field.tsx';
import { Form } from '../../../components/form/form.tsx';
import { PasswordField } from '../../../components/form/password-field.tsx';
import { useSignIn } from '../api/sign-in.ts';

const schema = accountEndpoints.signIn.body.extend({ password: z.string().min(1, 'Type the password').max(200) });

type Props = {
  /** Whose session goes on; the e-mail is then fixed. */
  email?: string;
  /** Stands beside the button. */
  beside?: ReactNode;
};

/** E-mail and password. */
export function SignInForm({ email, beside }: Props) {
  const signIn = useSignIn();
  const form = useForm({ resolver: zodResolver(schema), defaultValues: { email: email ?? '', password: '' } });
  const { errors } = form.formState;
  return (
    <Form
      form={form}
      label="Sign in"
      submit="Sign in"
      busy="Signing in"
      beside={beside}
      send={(body) => signIn.mutateAsync(body)}
    >
      <FormField label="E-mail" error={errors.email?.message}>
        <input
          type="email"
          autoComplete="username"
          autoCapitalize="none"
          spellCheck={false}
          readOnly={email !== undefined}
          {...form.register('email')}
        />
      </FormField>
      <PasswordField
        label="Password"
        autoComplete="current-password"
        error={errors.password?.message}
        registration={form.register('password')}
        autoFocus={email !== undefined}
      />
    </Form>
  );
}
