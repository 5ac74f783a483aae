import type { Logger } from 'pino';
import type { Db } from '../db/database.ts';
import { newId } from '../db/secret-tokens.ts';
import { seal, unseal } from '../secrets/seal.ts';

export type OutgoingMail = { to: string; subject: string; text: string };

/** Hands a mail to the mail server; rejects if that takes it not. */
export type Deliver = (mail: OutgoingMail) => Promise<void>;

export type Post = {
  /**
   * Writes a mail into the outbox, in the caller's transaction: it is sent if, and only if, what it tells of is kept.
   * It leaves at once, or later if the mail server does not answer.
   */
  send: (db: Db, mail: OutgoingMail) => Promise<void>;
  /** Stops sending and waits for the mail under way. What is left is sent after the next start. */
  close: () => Promise<void>;
};

type PostDeps = { db: Db; sealingKey: Uint8Array; deliver: Deliver; logger: Logger; now: () => number };

/** A mail server may be away for a while: tries go on for about a day, twice as far apart each time. */
const FIRST_WAIT_MS = 30_000;
const MOST_TRIES = 12;
const LOOK_EVERY_MS = 15_000;

/** The outbox and the one worker that empties it. */
export function openPost(deps: PostDeps): Post {
  let isClosed = false;
  let working: Promise<void> = Promise.resolve();
  const nudge = () => {
    working = working
      .then(() => (isClosed ? undefined : deliverDue(deps)))
      .catch((error: unknown) => {
        deps.logger.error({ err: error }, 'outbox failed');
      });
  };
  const timer = setInterval(nudge, LOOK_EVERY_MS);
  timer.unref();
  nudge();
  return {
    send: async (db, mail) => {
      await putIntoOutbox(deps, db, mail);
      nudge();
    },
    close: () => {
      isClosed = true;
      clearInterval(timer);
      return working;
    },
  };
}

async function putIntoOutbox({ sealingKey, now }: PostDeps, db: Db, mail: OutgoingMail): Promise<void> {
  const id = newId();
  await db
    .insertInto('outbox')
    .values({
      id,
      recipient: mail.to,
      subject: mail.subject,
      // Mails hold links that work: they do not lie open in the file.
      sealedText: seal(sealingKey, id, mail.text),
      createdAt: now(),
      tries: 0,
      nextTryAt: now(),
    })
    .execute();
}

async function deliverDue(deps: PostDeps): Promise<void> {
  const due = await deps.db
    .selectFrom('outbox')
    .selectAll()
    .where('nextTryAt', '<=', deps.now())
    .orderBy('createdAt')
    .execute();
  for (const { id, recipient, subject, sealedText, tries } of due) {
    try {
      await deps.deliver({ to: recipient, subject, text: unseal(deps.sealingKey, id, sealedText) });
      await deps.db.deleteFrom('outbox').where('id', '=', id).execute();
    } catch (error) {
      await postpone(deps, id, tries + 1, error);
    }
  }
}

async function postpone({ db, logger, now }: PostDeps, id: string, tries: number, error: unknown): Promise<void> {
  const givesUp = tries >= MOST_TRIES;
  logger.error({ err: error, mailId: id, tries, givesUp }, 'mail not sent');
  if (givesUp) await db.deleteFrom('outbox').where('id', '=', id).execute();
  else {
    const nextTryAt = now() + FIRST_WAIT_MS * 2 ** (tries - 1);
    await db.updateTable('outbox').set({ tries, nextTryAt }).where('id', '=', id).execute();
  }
}
