import { zodResolver } from '@hookform/resolvers/zod';
import { useForm } from 'react-hook-form';
import { Link } from 'react-router-dom';
import { accountEndpoints, type Person } from '../../../../../server/src/contract/account.ts';
import { Form } from '../../../components/form/form.tsx';
import { PASSWORD_RULE, PasswordField } from '../../../components/form/password-field.tsx';
import { toast } from '../../../components/toasts.tsx';
import { useChangePassword } from '../api/change-password.ts';

const initial = { presentPassword: '', newPassword: '' };

export function PasswordPart({ person }: { person: Person }) {
  return (
    <section className="page-part" aria-labelledby="part-password">
      <h2 id="part-password">Password</h2>
      {person.hasPassword ? (
        <PasswordForm email={person.email} />
      ) : (
        <p className="my-[8px] text-ink2">
          You sign in through your company. To have a password as well,{' '}
          <Link to="/forgot-password">set one by mail</Link>.
        </p>
      )}
    </section>
  );
}

function PasswordForm({ email }: { email: string }) {
  const change = useChangePassword();
  const form = useForm({ resolver: zodResolver(accountEndpoints.changePassword.body), defaultValues: initial });
  const { errors } = form.formState;
  return (
    <Form
      form={form}
      label="Password"
      submit="Change the password"
      busy="Changing the password"
      go={false}
      fieldOfCode={{ WRONG_PASSWORD: 'presentPassword' }}
      send={async (body) => {
        await change.mutateAsync(body);
        form.reset(initial);
        toast('The password is changed. Every other device is signed out.');
      }}
    >
      {/* Tells a password manager whose password this is. */}
      <input type="email" autoComplete="username" value={email} readOnly hidden />
      <PasswordField
        label="Present password"
        autoComplete="current-password"
        error={errors.presentPassword?.message}
        registration={form.register('presentPassword')}
      />
      <PasswordField
        label="New password"
        hint={PASSWORD_RULE}
        autoComplete="new-password"
        error={errors.newPassword?.message}
        registration={form.register('newPassword')}
      />
    </Form>
  );
}
