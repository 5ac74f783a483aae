import { zodResolver } from '@hookform/resolvers/zod';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { accountEndpoints, type Person } from '../../../../../server/src/contract/account.ts';
import { FormField } from '../../../components/form/form-field.tsx';
import { Form } from '../../../components/form/form.tsx';
import { PasswordField } from '../../../components/form/password-field.tsx';
import { Notice } from '../../../components/notice.tsx';
import { useAskEmailChange } from '../api/ask-email-change.ts';

const initial = { newEmail: '', password: '' };

/** The e-mail to sign in with. The old one stays until the link mailed to the new one is followed. */
export function EmailPart({ person }: { person: Person }) {
  return (
    <section className="page-part" aria-labelledby="part-email">
      <h2 id="part-email">E-mail</h2>
      <p className="my-[8px]">{person.email}</p>
      {person.hasPassword ? (
        <EmailForm />
      ) : (
        <p className="text-ink2">It can be changed once the account has a password.</p>
      )}
    </section>
  );
}

function EmailForm() {
  const ask = useAskEmailChange();
  const [sentTo, setSentTo] = useState<string | null>(null);
  const form = useForm({ resolver: zodResolver(accountEndpoints.askEmailChange.body), defaultValues: initial });
  const { errors } = form.formState;
  return (
    <>
      <Form
        form={form}
        label="E-mail"
        submit="Mail a link to it"
        busy="Mailing the link"
        go={false}
        fieldOfCode={{ WRONG_PASSWORD: 'password', EMAIL_TAKEN: 'newEmail' }}
        send={async (body) => {
          await ask.mutateAsync(body);
          setSentTo(body.newEmail);
          form.reset(initial);
        }}
      >
        <FormField
          label="New e-mail"
          error={errors.newEmail?.message}
          hint="The old one stays until its link is followed."
        >
          <input type="email" autoComplete="email" spellCheck={false} {...form.register('newEmail')} />
        </FormField>
        <PasswordField
          label="Present password"
          autoComplete="current-password"
          error={errors.password?.message}
          registration={form.register('password')}
        />
      </Form>
      {sentTo && (
        <div className="mt-[12px]">
          <Notice>A link is on its way to {sentTo}. It works once, within an hour.</Notice>
        </div>
      )}
    </>
  );
}
