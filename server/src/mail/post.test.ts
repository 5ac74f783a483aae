import { pino } from 'pino';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { type Db, openDatabase } from '../db/database.ts';
import { migrateToLatest } from '../db/migrate.ts';
import { type LocalMailServer, startLocalMailServer } from './local-mail-server.ts';
import { type OutgoingMail, openPost, type Post } from './post.ts';
import { smtpDelivery } from './smtp.ts';

const KEY = new Uint8Array(32).fill(7);
const MAIL = { to: 'ines@puna.example', subject: 'Join', text: 'https://volt.example/join#secret\n' };

let db: Db;
let post: Post | undefined;
let mailServer: LocalMailServer | undefined;
let clock: number;

beforeEach(async () => {
  clock = 1_000_000;
  db = openDatabase(':memory:');
  await migrateToLatest(db);
});
afterEach(async () => {
  await post?.close();
  await mailServer?.close();
  await db.destroy();
  [post, mailServer] = [undefined, undefined];
});

function open(deliver: (mail: OutgoingMail) => Promise<void>) {
  return openPost({ db, sealingKey: KEY, deliver, logger: pino({ level: 'silent' }), now: () => clock });
}

/** Mail leaves on its own; a busy machine takes longer. */
const eventually = <T>(check: () => T | Promise<T>) => vi.waitFor(check, 10_000);

const outbox = () => db.selectFrom('outbox').selectAll().execute();

describe('openPost', () => {
  it.each([
    ['ASCII', 'Join Puna', 'Open https://volt.example/join#abc\n'],
    ['accents and long lines', 'Únete a Puna · 高原', `${'ñandú '.repeat(60)}\n.\n..dots\n`],
  ])('brings a mail over SMTP as it was written: %s', async (_name, subject, text) => {
    mailServer = await startLocalMailServer(() => clock);
    post = open(smtpDelivery(mailServer.url, 'Voltiplano <v@localhost>'));
    await post.send(db, { to: 'ines@puna.example', subject, text });
    const { mails } = mailServer;
    await eventually(() => {
      expect(mails()).toHaveLength(1);
    });
    expect(mails()[0]).toMatchObject({ to: 'ines@puna.example', subject, text });
    await eventually(async () => {
      expect(await outbox()).toEqual([]);
    });
  });

  it('sends nothing of a transaction that is rolled back', async () => {
    const sent: OutgoingMail[] = [];
    post = open((mail) => Promise.resolve(void sent.push(mail)));
    const here = post;
    await expect(
      db.transaction().execute(async (transaction) => {
        await here.send(transaction, MAIL);
        throw new Error('changed my mind');
      }),
    ).rejects.toThrow('changed my mind');
    await post.send(db, { ...MAIL, subject: 'Second' });
    await eventually(() => {
      expect(sent.map(({ subject }) => subject)).toEqual(['Second']);
    });
  });

  it('tries again later, and no sooner, when the mail server is away', async () => {
    const deliver = vi.fn().mockRejectedValueOnce(new Error('away')).mockResolvedValue(undefined);
    post = open(deliver);
    await post.send(db, MAIL);
    await eventually(async () => {
      expect((await outbox())[0]).toMatchObject({ tries: 1, nextTryAt: clock + 30_000 });
    });
    await post.send(db, { ...MAIL, subject: 'Other' });
    await eventually(() => {
      expect(deliver).toHaveBeenCalledTimes(2);
    });
    expect(deliver).toHaveBeenLastCalledWith({ ...MAIL, subject: 'Other' });
    clock += 30_000;
    await post.send(db, { ...MAIL, subject: 'Third' });
    await eventually(async () => {
      expect(await outbox()).toEqual([]);
    });
    expect(deliver).toHaveBeenCalledWith(MAIL);
  });

  it('sends after a start what was left before it', async () => {
    const away = open(() => Promise.reject(new Error('away')));
    await away.send(db, MAIL);
    await eventually(async () => {
      expect((await outbox())[0]).toMatchObject({ tries: 1 });
    });
    await away.close();
    clock += 30_000;
    const deliver = vi.fn().mockResolvedValue(undefined);
    post = open(deliver);
    await eventually(() => {
      expect(deliver).toHaveBeenCalledWith(MAIL);
    });
  });

  it('keeps the link out of the database file', async () => {
    post = open(() => Promise.reject(new Error('away')));
    await post.send(db, MAIL);
    const [row] = await outbox();
    expect(row?.sealedText.toString('latin1')).not.toContain('secret');
  });
});
