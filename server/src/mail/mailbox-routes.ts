import type { Request } from 'express';
import { mailboxEndpoints } from '../contract/mailbox.ts';
import { type Api, ANSWERED } from '../http/api.ts';
import { escapeHtml, htmlPage } from '../http/html-page.ts';
import { HttpProblem } from '../http/problem.ts';
import type { LocalMailServer } from './local-mail-server.ts';

/** The mails of the local mail server, as JSON or, for a browser, as a page. Not mounted in production. */
export function mailboxRoutes(api: Api, mailServer: LocalMailServer): void {
  api.serve(mailboxEndpoints.readMailbox, ({ query, req, res }) => {
    if (!isFromThisMachine(req))
      throw new HttpProblem('NOT_FOUND', 'The mailbox opens on the machine of the server only.');
    const mails = mailServer.mails().filter(({ to }) => !query.to || to.toLowerCase() === query.to);
    if (req.accepts(['json', 'html']) !== 'html') return { items: [...mails] };
    res
      .type('html')
      .send(
        htmlPage(
          'Mailbox',
          mails.length === 0
            ? '<p>No mail yet.</p>'
            : mails
                .map(
                  ({ to, subject, text, receivedAt }) =>
                    `<article><h2>${escapeHtml(subject)}</h2><p>To ${escapeHtml(to)}, ${receivedAt}</p><pre>${linked(text)}</pre></article>`,
                )
                .join('\n'),
        ),
      );
    return ANSWERED;
  });
}

/** Mails hold links that sign people in: a server that was put on the network as it stands must not show them there. */
function isFromThisMachine(req: Request): boolean {
  const address = req.socket.remoteAddress ?? '';
  const isLoopback = address === '::1' || /^(::ffff:)?127\./.test(address);
  return isLoopback && req.get('x-forwarded-for') === undefined && req.get('forwarded') === undefined;
}

function linked(text: string): string {
  return escapeHtml(text).replace(/https?:\/\/[^\s<]+/g, (url) => `<a href="${url}">${url}</a>`);
}
