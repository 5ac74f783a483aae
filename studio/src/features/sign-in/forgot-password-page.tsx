import { zodResolver } from '@hookform/resolvers/zod';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { Link } from 'react-router-dom';
import { accountEndpoints } from '../../../../server/src/contract/account.ts';
import { FormField } from '../../components/form/form-field.tsx';
import { Form } from '../../components/form/form.tsx';
import { Notice } from '../../components/notice.tsx';
import { PageTitle } from '../../components/page-title.tsx';
import { useAskReset } from './api/ask-reset.ts';
import { MailboxLink } from './components/mailbox-link.tsx';

/** Asking for a link that sets a new password. It says the same whether the account exists. */
export function ForgotPasswordPage() {
  const askReset = useAskReset();
  const [sentTo, setSentTo] = useState<string | null>(null);
  const form = useForm({ resolver: zodResolver(accountEndpoints.askReset.body), defaultValues: { email: '' } });
  return (
    <section className="page form-page">
      <PageTitle page="Set a new password">Set a new password</PageTitle>
      <p className="text-ink2">A link is mailed to the address of your account. It works once, within an hour.</p>
      <Form
        form={form}
        label="Set a new password"
        submit="Mail the link"
        busy="Mailing the link"
        beside={<Link to="/sign-in">Back to signing in</Link>}
        send={async (body) => {
          setSentTo(null);
          await askReset.mutateAsync(body);
          setSentTo(body.email);
        }}
      >
        <FormField label="E-mail" error={form.formState.errors.email?.message}>
          <input type="email" autoComplete="username" spellCheck={false} {...form.register('email')} />
        </FormField>
      </Form>
      {sentTo && (
        <>
          <Notice>If an account has the e-mail {sentTo}, the link is on its way. Look in the spam as well.</Notice>
          <MailboxLink />
        </>
      )}
    </section>
  );
}
