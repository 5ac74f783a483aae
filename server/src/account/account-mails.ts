import type { OutgoingMail } from '../mail/post.ts';

/**
 * Mails about an account. Tokens stand behind the # of an address: browsers do not send that part to any server, so
 * that it comes into no log.
 */
export function resetMail(to: string, publicUrl: string, token: string): OutgoingMail {
  return {
    to,
    subject: 'Set a new password for Voltiplano',
    text: `Somebody asked for a new password for your Voltiplano account. Set it within an hour:

${publicUrl}/reset-password#${token}

If it was not you, do nothing: your password stays as it is.
`,
  };
}

export function emailChangeMail(to: string, publicUrl: string, token: string): OutgoingMail {
  return {
    to,
    subject: 'Confirm your new e-mail for Voltiplano',
    text: `Somebody wants to use this address for a Voltiplano account. Confirm it within an hour:

${publicUrl}/confirm-email#${token}

If it was not you, do nothing.
`,
  };
}

/** Tells the old address, so that a change by a stranger does not go unseen. */
export function emailChangedMail(to: string, newEmail: string): OutgoingMail {
  return {
    to,
    subject: 'Your e-mail for Voltiplano was changed',
    text: `Your Voltiplano account now uses ${newEmail}.

If it was not you, write to an owner of your workspace.
`,
  };
}
