import { zodResolver } from '@hookform/resolvers/zod';
import { useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { Link, useLocation } from 'react-router-dom';
import { accountEndpoints } from '../../../../server/src/contract/account.ts';
import { Button } from '../../components/button.tsx';
import { Form } from '../../components/form/form.tsx';
import { PASSWORD_RULE, PasswordField } from '../../components/form/password-field.tsx';
import { Notice } from '../../components/notice.tsx';
import { PageTitle } from '../../components/page-title.tsx';
import { setSignedOut } from '../../lib/session/me-query.ts';
import { useResetPassword } from './api/reset-password.ts';

const schema = accountEndpoints.resetPassword.body.pick({ password: true });

/** Setting a new password by the mailed link, whose token stands behind the # of the address. */
export function ResetPasswordPage() {
  const client = useQueryClient();
  const token = useLocation().hash.slice(1);
  const [isSet, setIsSet] = useState(false);
  return (
    <section className="page form-page">
      <PageTitle page="Set a new password">Set a new password</PageTitle>
      {isSet ? (
        <>
          <Notice>The new password is set, and every device is signed out.</Notice>
          <Button go asChild>
            <Link to="/sign-in">Sign in</Link>
          </Button>
        </>
      ) : token ? (
        <ResetForm
          token={token}
          onSet={() => {
            setSignedOut(client);
            setIsSet(true);
          }}
        />
      ) : (
        <Notice kind="stop" action={<Link to="/forgot-password">Mail a new link</Link>}>
          The address lacks what stands behind its #. Open the whole link from the mail.
        </Notice>
      )}
    </section>
  );
}

function ResetForm({ token, onSet }: { token: string; onSet: () => void }) {
  const resetPassword = useResetPassword();
  const form = useForm({ resolver: zodResolver(schema), defaultValues: { password: '' } });
  return (
    <Form
      form={form}
      label="Set a new password"
      submit="Set the password"
      busy="Setting the password"
      beside={<Link to="/forgot-password">Mail a new link</Link>}
      send={async ({ password }) => {
        await resetPassword.mutateAsync({ token, password });
        onSet();
      }}
    >
      <p className="text-ink2">Every device that is signed in will be signed out.</p>
      <PasswordField
        label="New password"
        hint={PASSWORD_RULE}
        autoComplete="new-password"
        error={form.formState.errors.password?.message}
        registration={form.register('password')}
      />
    </Form>
  );
}
