import { zodResolver } from '@hookform/resolvers/zod';
import { useForm } from 'react-hook-form';
import { accountEndpoints } from '../../../../../server/src/contract/account.ts';
import { FormField } from '../../../components/form/form-field.tsx';
import { Form } from '../../../components/form/form.tsx';
import { PASSWORD_RULE, PasswordField } from '../../../components/form/password-field.tsx';
import { useSignUp } from '../api/sign-up.ts';

/** Who somebody is, and what their team is called. */
export function SignUpForm() {
  const signUp = useSignUp();
  const form = useForm({
    resolver: zodResolver(accountEndpoints.signUp.body),
    defaultValues: { name: '', email: '', password: '', workspaceName: '' },
  });
  const { errors } = form.formState;
  return (
    <Form
      form={form}
      label="Make an account"
      submit="Make the account"
      busy="Making the account"
      fieldOfCode={{ EMAIL_TAKEN: 'email' }}
      send={(body) => signUp.mutateAsync(body)}
    >
      <FormField label="Your name" error={errors.name?.message} hint="As others in the workspace will read it.">
        <input autoComplete="name" {...form.register('name')} />
      </FormField>
      <FormField label="E-mail" error={errors.email?.message}>
        <input type="email" autoComplete="username" spellCheck={false} {...form.register('email')} />
      </FormField>
      <PasswordField
        label="Password"
        hint={PASSWORD_RULE}
        autoComplete="new-password"
        error={errors.password?.message}
        registration={form.register('password')}
      />
      <FormField
        label="Workspace"
        error={errors.workspaceName?.message}
        hint="The name of your team or project. It can be changed later."
      >
        <input autoComplete="organization" {...form.register('workspaceName')} />
      </FormField>
    </Form>
  );
}
