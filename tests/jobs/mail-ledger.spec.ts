import { randomUUID } from 'node:crypto';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import type { MailLedgerRow, MailState } from '#shared/mail/mail-ledger';
import { system } from '#server/db/database';
import { createMailSender, type MailSender } from '#server/mail/mail-sender';
import { createMailTransport, type MailTransport } from '#server/mail/mail-transport';
import { reserveMail } from '#server/mail/reserve-mail';
import { addPerson } from '#tests/support/factories/people';
import { SmtpCatcher } from '#tests/support/smtp-catcher';
import { startTestApp, type TestApp } from '#tests/support/test-app';
import type { TestClient } from '#tests/support/test-client';

let app: TestApp;
let catcher: SmtpCatcher;
let registrar: TestClient;
const transports: MailTransport[] = [];

beforeAll(async () => {
  app = await startTestApp();
  catcher = await new SmtpCatcher().start();
  const person = await addPerson(app.store.owner, { isRegistrar: true });
  registrar = await app.client().signIn(person.email);
});
afterEach(async () => {
  catcher.behaveAs(() => ({ kind: 'accept' }));
  catcher.release();
  transports.splice(0).forEach((transport) => transport.close());
  // What one test leaves due is not sent in the next one.
  await app.store.owner('mail').whereIn('state', ['reserved', 'ready']).update({ state: 'dropped',
    frozen_at: app.store.owner.fn.now(),
    message_id: app.store.owner.raw(`coalesce(message_id, id::text)`) });
});
afterAll(async () => {
  await catcher.stop();
  await app.stop();
});

/** A sender of its own, as each worker has; its mails say what their parameters say. */
function newSender(smtpUrl = catcher.url): MailSender {
  const transport = createMailTransport(smtpUrl, 'Registry <registry@touchneedle.example>');
  transports.push(transport);
  return createMailSender({
    database: app.database, transport, logger: app.logger, messageIdDomain: 'touchneedle.example',
    composers: { notice: async (_trx, mail) => ({ to: mail.address, subject: 'A notice',
      text: `About ${String(mail.parameters['about'])}`, html: '<p>About it</p>', headers: {} }) },
  });
}

interface Reserved { readonly cause: string; readonly address: string }

async function reserve(cause = `test:${randomUUID()}`): Promise<Reserved> {
  const address = `${randomUUID()}@example.org`;
  await app.database.asActor(system, (trx) => reserveMail(trx, { cause, kind: 'notice',
    personId: null, address, parameters: { about: cause } }));
  return { cause, address };
}

interface LedgerEntry {
  readonly id: string; readonly state: MailState; readonly answer: string | null;
  readonly attempts: number; readonly message_id: string; readonly not_before: Date;
  readonly claim_token: string | null;
}

function entryOf({ cause }: Reserved): Promise<LedgerEntry> {
  return app.store.owner('mail').where({ cause }).first();
}

/** As if the time until the next try, or until the claim ends, had gone by. */
async function letTimePass(): Promise<void> {
  await app.store.owner('mail').where({ state: 'ready' }).update({ not_before: new Date(0) });
  await app.store.owner('mail').where({ state: 'sending' }).update({ claimed_until: new Date(0) });
}

describe('the outcome of a try', () => {
  it('is sent, with the answer of the server', async () => {
    const mail = await reserve();
    expect(await newSender().tick()).toBe(1);
    expect(await entryOf(mail)).toMatchObject({ state: 'sent', attempts: 1, claim_token: null,
      answer: expect.stringMatching(/^250/) });
    expect(catcher.mailsTo(mail.address)).toHaveLength(1);
  });

  it.each(['recipient', 'body'] as const)('is final where 5xx refuses the %s', async (at) => {
    catcher.behaveAs(() => ({ kind: 'refuse', at, code: 550 }));
    const mail = await reserve();
    const sender = newSender();
    await sender.tick();
    expect(await entryOf(mail)).toMatchObject({ state: 'refused',
      answer: expect.stringMatching(/550/) });
    await letTimePass();
    expect(await sender.tick()).toBe(0);
    expect(catcher.mailsTo(mail.address)).toEqual([]);
  });

  it.each(['recipient', 'body'] as const)('is tried again where 4xx refuses the %s', async (at) => {
    catcher.behaveAs((_address, nth) => nth === 1
      ? { kind: 'refuse', at, code: 451 } : { kind: 'accept' });
    const mail = await reserve();
    const sender = newSender();
    await sender.tick();
    const waiting = await entryOf(mail);
    expect(waiting).toMatchObject({ state: 'ready', answer: expect.stringMatching(/451/) });
    expect(waiting.not_before.getTime()).toBeGreaterThan(Date.now());
    expect(await sender.tick(), 'before its time').toBe(0);
    await letTimePass();
    await sender.tick();
    expect(await entryOf(mail)).toMatchObject({ state: 'sent', attempts: 2 });
    expect(catcher.mailsTo(mail.address)).toHaveLength(1);
  });

  it('is tried again where the connection broke at the recipient, since nothing left', async () => {
    const broken = await reserve();
    const sender = newSender();
    catcher.behaveAs(() => ({ kind: 'drop_at_recipient' }));
    await sender.tick();
    expect(await entryOf(broken)).toMatchObject({ state: 'ready' });
    catcher.behaveAs(() => ({ kind: 'accept' }));
    await letTimePass();
    await sender.tick();
    expect(await entryOf(broken)).toMatchObject({ state: 'sent' });
    expect(catcher.mailsTo(broken.address)).toHaveLength(1);
  });

  it('is uncertain where the connection broke after the body, and is left alone', async () => {
    catcher.behaveAs(() => ({ kind: 'drop_after_body' }));
    const mail = await reserve();
    const sender = newSender();
    await sender.tick();
    expect(await entryOf(mail)).toMatchObject({ state: 'uncertain' });
    catcher.behaveAs(() => ({ kind: 'accept' }));
    await letTimePass();
    expect(await sender.tick()).toBe(0);
    expect(catcher.named.filter((each) => each === mail.address)).toHaveLength(1);
    expect(catcher.mailsTo(mail.address)).toHaveLength(1);
  });

  it('is tried again where nobody listens', async () => {
    const away = await new SmtpCatcher().start();
    const address = away.url;
    await away.stop();
    const mail = await reserve();
    await newSender(address).tick();
    expect(await entryOf(mail)).toMatchObject({ state: 'ready',
      answer: expect.stringMatching(/ECONNREFUSED/) });
    await letTimePass();
    await newSender().tick();
    expect(await entryOf(mail)).toMatchObject({ state: 'sent', attempts: 2 });
  });

  it('ends in refused after twelve tries', async () => {
    catcher.behaveAs(() => ({ kind: 'refuse', at: 'recipient', code: 421 }));
    const mail = await reserve();
    const sender = newSender();
    for (let round = 1; round <= 12; round++) {
      expect(await sender.tick(), `try ${round}`).toBe(1);
      await letTimePass();
    }
    expect(await sender.tick()).toBe(0);
    expect(await entryOf(mail)).toMatchObject({ state: 'refused', attempts: 12 });
  });
});

describe('a claim', () => {
  it('that ran out makes the mail uncertain, and a late answer still settles it', async () => {
    catcher.behaveAs(() => ({ kind: 'hang' }));
    const mail = await reserve();
    const sending = newSender().tick();
    await catcher.until(() => catcher.mailsTo(mail.address).length === 1);
    expect(await entryOf(mail)).toMatchObject({ state: 'sending' });
    await letTimePass();
    expect(await newSender().tick()).toBe(0);
    expect(await entryOf(mail)).toMatchObject({ state: 'uncertain', claim_token: null });
    catcher.release();
    await sending;
    expect(await entryOf(mail)).toMatchObject({ state: 'sent', attempts: 1 });
    expect(catcher.mailsTo(mail.address)).toHaveLength(1);
  });

  it('is not overruled by a late answer once the registrar has settled it', async () => {
    catcher.behaveAs(() => ({ kind: 'hang' }));
    const mail = await reserve();
    const sending = newSender().tick();
    await catcher.until(() => catcher.mailsTo(mail.address).length === 1);
    await letTimePass();
    await newSender().tick();
    const { id } = await entryOf(mail);
    await settle(id, 'drop');
    catcher.release();
    await sending;
    expect(await entryOf(mail)).toMatchObject({ state: 'dropped' });
  });

  it('goes to one of two senders at once: each mail leaves once', async () => {
    const mails = await Promise.all(Array.from({ length: 40 }, () => reserve()));
    const senders = [newSender(), newSender(), newSender()];
    await Promise.all(senders.map(async (sender) => {
      for (let round = 0; round < 20; round++) await sender.tick();
    }));
    for (const mail of mails) {
      expect(catcher.mailsTo(mail.address)).toHaveLength(1);
      expect(await entryOf(mail)).toMatchObject({ state: 'sent', attempts: 1 });
    }
  });
});

describe('what names a mail', () => {
  it('is one Message-ID for all its tries and no other mail', async () => {
    catcher.behaveAs((_address, nth) => nth <= 2
      ? { kind: 'refuse', at: 'body', code: 451 } : { kind: 'accept' });
    const mails = [await reserve(), await reserve()];
    const sender = newSender();
    const seen = new Set<string>();
    for (let round = 0; round < 3; round++) {
      await sender.tick();
      for (const mail of mails) seen.add((await entryOf(mail)).message_id);
      await letTimePass();
    }
    expect(seen.size).toBe(2);
    for (const mail of mails) {
      const [caught, ...more] = catcher.mailsTo(mail.address);
      expect(more).toEqual([]);
      expect(caught?.messageId).toBe((await entryOf(mail)).message_id);
      expect(caught?.messageId).toMatch(/^<[0-9a-f-]{36}@touchneedle\.example>$/);
    }
  });

  it('is one cause: a second reservation makes no second mail', async () => {
    const first = await reserve();
    const again = await reserve(first.cause);
    await newSender().tick();
    expect(catcher.mailsTo(first.address)).toHaveLength(1);
    expect(catcher.mailsTo(again.address)).toEqual([]);
  });

  it('survives two reservations of one cause at once', async () => {
    const cause = `test:${randomUUID()}`;
    const both = await Promise.all([reserve(cause), reserve(cause)]);
    await newSender().tick();
    expect(both.flatMap(({ address }) => catcher.mailsTo(address))).toHaveLength(1);
  });
});

describe('the registrar', () => {
  it('sees what is uncertain and leaves it in peace where it arrived', async () => {
    const mail = await uncertainMail();
    const list = await registrar.get<{ items: MailLedgerRow[] }>(
      '/api/registry/mail?state=uncertain');
    expect(list.body.items.map(({ address }) => address)).toContain(mail.address);
    await settle((await entryOf(mail)).id, 'arrived');
    await newSender().tick();
    expect(await entryOf(mail)).toMatchObject({ state: 'settled_sent' });
    expect(catcher.mailsTo(mail.address)).toHaveLength(1);
  });

  it('has one new mail sent in the place of a lost one, however often it is said', async () => {
    const mail = await uncertainMail();
    const { id, message_id: lostMessageId } = await entryOf(mail);
    await settle(id, 'lost');
    const repeated = await registrar.post<{ code: string }>(
      `/api/registry/mail/${id}/settlement`, { outcome: 'lost' });
    expect([repeated.status, repeated.body.code]).toEqual([409, 'already_decided']);
    await newSender().tick();
    await newSender().tick();
    const [, anew, ...more] = catcher.mailsTo(mail.address);
    expect(more).toEqual([]);
    expect(anew?.messageId).not.toBe(lostMessageId);
    expect(await entryOf(mail)).toMatchObject({ state: 'settled_lost' });
  });

  it('drops one: nothing more is sent', async () => {
    const mail = await uncertainMail();
    await settle((await entryOf(mail)).id, 'drop');
    await newSender().tick();
    expect(await entryOf(mail)).toMatchObject({ state: 'dropped' });
    expect(catcher.mailsTo(mail.address)).toHaveLength(1);
  });

  it('settles only what is uncertain', async () => {
    const mail = await reserve();
    await newSender().tick();
    const answer = await registrar.post(
      `/api/registry/mail/${(await entryOf(mail)).id}/settlement`, { outcome: 'lost' });
    expect(answer.status).toBe(409);
  });

  it('is the only one who does: a member may neither look nor settle', async () => {
    const mail = await uncertainMail();
    const other = await addPerson(app.store.owner, { roles: ['subscriber'] });
    const subscriber = await app.client().signIn(other.email);
    expect((await subscriber.get('/api/registry/mail')).status).toBe(403);
    expect((await subscriber.post(`/api/registry/mail/${(await entryOf(mail)).id}/settlement`,
      { outcome: 'drop' })).status).toBe(403);
    expect(await entryOf(mail)).toMatchObject({ state: 'uncertain' });
  });
});

async function uncertainMail(): Promise<Reserved> {
  catcher.behaveAs(() => ({ kind: 'drop_after_body' }));
  const mail = await reserve();
  await newSender().tick();
  expect(await entryOf(mail)).toMatchObject({ state: 'uncertain' });
  catcher.behaveAs(() => ({ kind: 'accept' }));
  return mail;
}

async function settle(id: string, outcome: 'arrived' | 'lost' | 'drop'): Promise<void> {
  const answer = await registrar.post(`/api/registry/mail/${id}/settlement`, { outcome });
  expect(answer.status, answer.text).toBe(204);
}
