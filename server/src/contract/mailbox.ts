import { z } from 'zod';
import { momentSchema } from './common.ts';
import { defineEndpoint } from './endpoint.ts';

export const mailSchema = z
  .object({ to: z.string(), subject: z.string(), text: z.string(), receivedAt: momentSchema })
  .meta({ id: 'Mail' });
export type Mail = z.infer<typeof mailSchema>;

export const mailboxEndpoints = {
  readMailbox: defineEndpoint({
    id: 'readMailbox',
    method: 'get',
    path: '/dev/mailbox',
    tag: 'Development',
    summary: 'Mails that the local mail server took, newest first; in development only, a page for a browser',
    access: 'anyone',
    query: z.object({ to: z.string().toLowerCase().optional() }),
    status: 200,
    answer: z.object({ items: z.array(mailSchema) }),
    problems: ['NOT_FOUND'],
  }),
} as const;
