import { useSignInOptions } from '../api/sign-in-options.ts';

/** Where mails can be read that go nowhere; in development only. */
export function MailboxLink() {
  const { data } = useSignInOptions();
  if (!data?.mailboxUrl) return null;
  return (
    <p className="text-label text-ink3">
      This server sends no real mail. <a href={data.mailboxUrl}>Read the local mailbox</a>.
    </p>
  );
}
