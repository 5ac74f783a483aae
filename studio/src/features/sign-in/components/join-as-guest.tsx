import { zodResolver } from '@hookform/resolvers/zod';
import { useForm } from 'react-hook-form';
import { useNavigate } from 'react-router-dom';
import { accountEndpoints } from '../../../../../server/src/contract/account.ts';
import type { InvitationPreview } from '../../../../../server/src/contract/workspace.ts';
import { FormField } from '../../../components/form/form-field.tsx';
import { Form } from '../../../components/form/form.tsx';
import { PASSWORD_RULE, PasswordField } from '../../../components/form/password-field.tsx';
import { useSignUpInvited } from '../api/sign-up-invited.ts';
import { homePlace } from '../model/home-place.ts';
import { keepForReturn } from '../model/kept-for-return.ts';
import { ProviderButton } from './provider-button.tsx';
import { SignInForm } from './sign-in-form.tsx';

type Props = { token: string; preview: InvitationPreview };

/** Joining for somebody who is not signed in: with the account that the e-mail has, or by making one. */
export function JoinAsGuest({ token, preview }: Props) {
  return (
    <>
      <h2>{preview.hasAccount ? 'Sign in to join' : 'Make an account to join'}</h2>
      {preview.hasAccount ? <SignInForm email={preview.email} /> : <InvitedForm token={token} preview={preview} />}
      <ProviderButton next="/join" onLeave={() => keepForReturn('invitation', token)} />
    </>
  );
}

const schema = accountEndpoints.signUpInvited.body.omit({ token: true });

function InvitedForm({ token, preview: { email } }: Props) {
  const signUp = useSignUpInvited();
  const navigate = useNavigate();
  const form = useForm({ resolver: zodResolver(schema), defaultValues: { name: '', password: '' } });
  const { errors } = form.formState;
  return (
    <Form
      form={form}
      label="Make an account to join"
      submit="Make the account and join"
      busy="Joining"
      send={async (values) => {
        const me = await signUp.mutateAsync({ token, ...values });
        keepForReturn('invitation', null);
        await navigate(homePlace(me));
      }}
    >
      <FormField label="E-mail" hint="The invitation is for this address.">
        <input type="email" autoComplete="username" readOnly value={email} />
      </FormField>
      <FormField label="Your name" error={errors.name?.message} hint="As others in the workspace will read it.">
        <input autoComplete="name" {...form.register('name')} />
      </FormField>
      <PasswordField
        label="Password"
        hint={PASSWORD_RULE}
        autoComplete="new-password"
        error={errors.password?.message}
        registration={form.register('password')}
      />
    </Form>
  );
}
