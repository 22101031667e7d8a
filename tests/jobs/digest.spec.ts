import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { ReportContent } from '#shared/reports/report-content';
import { addClub, addMember, addPerson, type TestClub,
  type TestPerson } from '#tests/support/factories/people';
import { cameraJpeg } from '#tests/support/factories/pictures';
import { fileReport, publishReport, reportContent,
  uploadPhoto } from '#tests/support/factories/reports';
import { MailRoom } from '#tests/support/mail-room';
import type { CaughtMail } from '#tests/support/smtp-catcher';
import { startTestApp, type TestApp } from '#tests/support/test-app';
import type { TestClient } from '#tests/support/test-client';

let app: TestApp;
let room: MailRoom;
let club: TestClub;
let author: TestClient;
let openTell: { id: string; name: string };
let closedTell: { id: string; name: string };

beforeAll(async () => {
  app = await startTestApp();
  room = await MailRoom.open(app);
  club = await addClub(app.store.owner);
  author = await app.client().signIn((await addMember(app.store.owner, club)).email);
  const tells = (disclosure: string) =>
    app.store.owner('tell').where({ disclosure }).orderBy('id').first('id', 'name');
  openTell = await tells('public');
  closedTell = await tells('clubs');
});
afterAll(async () => {
  await room.close();
  await app.stop();
});

const tellOf = (tell: { id: string }) =>
  ({ tellId: tell.id, note: '', disclosure: 'public' as const, pins: [] });
const pieceOf = (description: string): Pick<ReportContent, 'presentedAs'> => ({ presentedAs:
  { coinType: null, kind: 'coin', metal: 'gold', description, year: 1891, mintMark: '' } });

async function publish(
  audience: 'public' | 'clubs' | 'club', changes: Partial<ReportContent> = {},
): Promise<string> {
  const number = await fileReport(author, reportContent(club, { audience, ...changes }));
  await publishReport(app.store.owner, number, { audience });
  return number;
}

/** Whose every mail reader says of the mail: both parts and all headers. */
function textOf(mail: CaughtMail): string {
  return `${mail.raw}\n${mail.parsed.text ?? ''}\n${mail.parsed.html || ''}`;
}

async function onlyMailTo(person: TestPerson): Promise<CaughtMail> {
  const [mail, ...more] = room.mailsTo(person);
  expect(more).toEqual([]);
  if (!mail) throw new Error('no mail came');
  return mail;
}

/** Matches, plans and sends; resolves to the one mail. */
async function deliver(number: string, person: TestPerson): Promise<CaughtMail> {
  await room.match(number);
  await room.plan();
  await room.send();
  return onlyMailTo(person);
}

const subscriber = (): Promise<TestPerson> =>
  addPerson(app.store.owner, { roles: ['subscriber'] });

/** Nobody listens to the reports of a test that is over. */
async function removeWatches(): Promise<void> {
  await app.store.owner('watch').update({ deleted_at: new Date() });
}

describe('a digest', () => {
  it('says in both parts what was found and why, and how to stop', async () => {
    const person = await subscriber();
    await room.addWatch(person, { text: 'harbour', metal: ['gold', 'silver'], tell: [openTell.id],
      yearFrom: 1880 }, { name: 'Gold <of> the harbour' });
    const number = await publish('public',
      { ...pieceOf('Harbour "ducat" & more'), tells: [tellOf(openTell)] });
    const { parsed, raw } = await deliver(number, person);
    await removeWatches();
    expect(parsed.subject).toBe('A new report for you');
    const address = `${app.baseUrl}/reports/${number}`;
    const stop = /\/unsubscribe\/[\w.-]+/.exec(parsed.text ?? '')?.[0];
    for (const part of [parsed.text ?? '', parsed.html || '']) {
      expect(part).toContain(address);
      expect(part).toContain(`${app.baseUrl}${stop}`);
      expect(part).toContain('opinion on one piece');
      for (const reason of ['harbour', 'gold', openTell.name, '1891']) {
        expect(part).toContain(reason);
      }
    }
    expect(parsed.text).toContain('Watch: Gold <of> the harbour');
    expect(parsed.text).toContain('Harbour "ducat" & more');
    expect(parsed.html).toContain('Gold &#60;of&#62; the harbour');
    expect(parsed.html).not.toContain('<of>');
    expect(raw).toMatch(/^Content-Type: multipart\/alternative/m);
    expect(Math.max(...raw.split('\r\n').map((line) => line.length))).toBeLessThanOrEqual(998);
  });

  it('carries the headers of RFC 8058, 2919, 3834 and 5322, each once', async () => {
    const person = await subscriber();
    await room.addWatch(person);
    const { raw, parsed } = await deliver(await publish('public'), person);
    await removeWatches();
    const [head = ''] = raw.split('\r\n\r\n');
    const values = (name: string): string[] => [...head.replace(/\r\n[ \t]+/g, ' ')
      .matchAll(new RegExp(`^${name}: (.*)$`, 'gim'))].map(([, value = '']) => value.trim());
    expect(values('List-Unsubscribe-Post')).toEqual(['List-Unsubscribe=One-Click']);
    expect(values('List-Unsubscribe')).toEqual([
      expect.stringMatching(new RegExp(`^<${app.baseUrl}/unsubscribe/[\\w.-]+>$`))]);
    expect(values('List-Id')).toEqual([expect.stringMatching(/<digests\.[\w.]+>$/)]);
    expect(values('Auto-Submitted')).toEqual(['auto-generated']);
    expect(values('From')).toHaveLength(1);
    expect(values('Date')).toHaveLength(1);
    expect(values('To')).toEqual([person.email]);
    expect(values('Message-ID')).toEqual([parsed.messageId]);
  });

  it('shows pictures of public publications alone, at an address good without a session',
    async () => {
      const member = await addMember(app.store.owner, await addClub(app.store.owner));
      await room.addWatch(member, {}, { cadence: 'at_once' });
      const photo = async (): Promise<Pick<ReportContent, 'photos'>> => ({ photos: [{
        photoId: await uploadPhoto(author, await cameraJpeg()), side: 'obverse',
        circle: { x: 0.5, y: 0.5, radius: 0.4 }, uprightDegrees: 0, caption: '' }] });
      const shown = await publish('public', await photo());
      const kept = await publish('clubs', await photo());
      await room.match(shown);
      const mail = await deliver(kept, member);
      await removeWatches();
      expect(mail.parsed.text).toContain(shown);
      expect(mail.parsed.text).toContain(kept);
      const pictures = [...(mail.parsed.html || '').matchAll(/<img src="([^"]+)"/g)]
        .map(([, address = '']) => address);
      expect(pictures).toHaveLength(1);
      const answer = await fetch(pictures[0] ?? '');
      expect([answer.status, answer.headers.get('content-type')]).toEqual([200, 'image/jpeg']);
    });

  it('is one for a person with several watches, with each report once', async () => {
    const person = await subscriber();
    await room.addWatch(person, { metal: ['gold'] }, { name: 'Gold' });
    await room.addWatch(person, {}, { name: 'All' });
    await room.addWatch(person, { text: 'ferry' }, { name: 'Ferry' });
    const both = await publish('public', pieceOf('Ferry ducat'));
    const other = await publish('public', pieceOf('Mill ducat'));
    await room.match(both);
    const { parsed } = await deliver(other, person);
    await removeWatches();
    expect(parsed.subject).toBe('2 new reports for you');
    for (const number of [both, other]) {
      expect(parsed.text?.split(`/reports/${number}`)).toHaveLength(2);
    }
  });

  it('repeats nothing: a second match makes no alert and no mail', async () => {
    const person = await subscriber();
    await room.addWatch(person);
    const number = await publish('public');
    expect(await room.match(number)).toBe(1);
    expect(await room.match(number)).toBe(0);
    await Promise.all([room.match(number), room.match(number)]);
    await deliver(number, person);
    await room.plan(new Date(Date.now() + 3_600_000));
    await room.send();
    await onlyMailTo(person);
    await removeWatches();
  });
});

describe('who gets what', () => {
  it('tells nobody of what they may not read, and no reporter of their own', async () => {
    const stranger = await subscriber();
    const otherClub = await addMember(app.store.owner, await addClub(app.store.owner));
    const fellow = await addMember(app.store.owner, club);
    const reporter = await addMember(app.store.owner, club);
    for (const person of [stranger, otherClub, fellow, reporter]) await room.addWatch(person);
    const own = await fileReport(await app.client().signIn(reporter.email),
      reportContent(club, { audience: 'club' }));
    await publishReport(app.store.owner, own, { audience: 'club' });
    const forClubs = await publish('clubs');
    await room.match(forClubs);
    await room.match(own);
    await room.plan();
    await room.send();
    await removeWatches();
    expect(room.mailsTo(stranger)).toEqual([]);
    expect((await onlyMailTo(otherClub)).parsed.text).toContain(forClubs);
    expect(textOf(await onlyMailTo(otherClub))).not.toContain(own);
    expect((await onlyMailTo(fellow)).parsed.text).toContain(own);
    expect(textOf(await onlyMailTo(reporter))).not.toContain(own);
  });

  it('leaves out what the recipient lost sight of, and drops what is empty', async () => {
    const leaver = await addMember(app.store.owner, club);
    const emptied = await addMember(app.store.owner, club);
    await room.addWatch(leaver);
    await room.addWatch(emptied, { text: 'whispered' });
    const open = await publish('public', pieceOf('Open ducat'));
    const closed = await publish('club', pieceOf('Whispered ducat'));
    await room.match(open);
    await room.match(closed);
    await room.plan();
    await app.store.owner('membership').whereIn('person_id', [leaver.id, emptied.id])
      .update({ during: app.store.owner.raw('tstzrange(lower(during), now())') });
    await room.send();
    await removeWatches();
    const mail = await onlyMailTo(leaver);
    expect(mail.parsed.text).toContain(open);
    expect(textOf(mail)).not.toMatch(new RegExp(`${closed}|Whispered`));
    expect(room.mailsTo(emptied)).toEqual([]);
    const { state } = await app.store.owner('mail').where({ person_id: emptied.id }).first('state');
    expect(state).toBe('dropped');
  });

  it('keeps a retracted report back', async () => {
    const person = await subscriber();
    await room.addWatch(person);
    const number = await publish('public');
    await room.match(number);
    await room.plan();
    await app.store.owner('report').where({ number }).update({ state: 'retracted' });
    const { id } = await app.store.owner('report').where({ number }).first('id');
    await app.store.owner.raw('select renew_report_search(?)', [id]);
    await room.send();
    await removeWatches();
    expect(room.mailsTo(person)).toEqual([]);
  });

  it('names a tell of the clubs, and words of the account, to nobody without a club', async () => {
    const stranger = await subscriber();
    const leaver = await addMember(app.store.owner, await addClub(app.store.owner));
    const member = await addMember(app.store.owner, await addClub(app.store.owner));
    for (const person of [stranger, leaver, member]) {
      await room.addWatch(person, { tell: [closedTell.id] }, { name: 'A tell' });
      await room.addWatch(person, { text: 'zebrawood' }, { name: 'The box' });
      await room.addWatch(person, { metal: ['gold'] }, { name: 'Gold' });
    }
    const number = await publish('public', { ...pieceOf('Quay ducat'),
      account: '<p>In a box of zebrawood.</p>',
      tells: [tellOf(openTell), tellOf(closedTell)] });
    await room.match(number);
    await room.plan();
    await app.store.owner('membership').where({ person_id: leaver.id })
      .update({ during: app.store.owner.raw('tstzrange(lower(during), now())') });
    await room.send();
    await removeWatches();
    for (const person of [stranger, leaver]) {
      const mail = await onlyMailTo(person);
      expect(mail.parsed.text).toContain(number);
      const said = textOf(mail);
      for (const secret of [closedTell.name, closedTell.id, closedTell.id.replaceAll('_', ' '),
        'zebrawood', 'A tell', 'The box']) expect(said).not.toContain(secret);
    }
    expect((await onlyMailTo(member)).parsed.text).toContain(closedTell.name);
    const { rows } = await app.store.owner.raw(
      'select reasons::text as reasons from alert where person_id = ?', [stranger.id]);
    expect(rows).toHaveLength(1);
    expect(rows[0].reasons).not.toContain(closedTell.id);
  });

  it('stops for a watch that is paused or removed before the mail leaves', async () => {
    const paused = await subscriber();
    const removed = await subscriber();
    const one = await room.addWatch(paused);
    const other = await room.addWatch(removed);
    await room.match(await publish('public'));
    await room.plan();
    await app.store.owner('watch').where({ id: one }).update({ paused_until: '9999-12-31' });
    await app.store.owner('watch').where({ id: other }).update({ deleted_at: new Date() });
    await room.match(await publish('public'));
    await room.plan(new Date(Date.now() + 120_000));
    await room.send();
    await removeWatches();
    expect(room.mailsTo(paused)).toEqual([]);
    expect(room.mailsTo(removed)).toEqual([]);
  });
});

describe('the link that stops', () => {
  const body = 'List-Unsubscribe=One-Click';
  const post = (address: string, text = body): Promise<Response> => fetch(address, {
    method: 'POST', body: text, redirect: 'manual',
    headers: { 'Content-Type': 'application/x-www-form-urlencoded' } });
  const isPaused = async (person: TestPerson): Promise<boolean> => {
    const { paused } = await app.store.owner('watch').where({ person_id: person.id })
      .first(app.store.owner.raw('coalesce(paused_until > now(), false) as paused'));
    return paused;
  };

  it('works by one click without a session, twice as well, and not by being looked at',
    async () => {
      expect(body).toHaveLength(26);
      const person = await subscriber();
      await room.addWatch(person);
      const { raw } = await deliver(await publish('public'), person);
      const address = /List-Unsubscribe: <([^>]+)>/
        .exec(raw.replace(/\r\n[ \t]+/g, ' '))?.[1] ?? '';
      await fetch(address);
      await fetch(address.replace('/unsubscribe/', '/api/unsubscribe/'));
      await fetch(address, { method: 'HEAD' });
      expect(await isPaused(person)).toBe(false);
      expect((await post(address, 'List-Unsubscribe=Maybe')).status).toBe(422);
      expect(await isPaused(person)).toBe(false);
      for (let time = 0; time < 2; time++) {
        const answer = await post(address);
        expect([answer.status, await answer.text(), answer.headers.get('set-cookie')])
          .toEqual([200, '', null]);
        expect(await isPaused(person)).toBe(true);
      }
      await room.match(await publish('public'));
      await room.plan(new Date(Date.now() + 120_000));
      await room.send();
      await onlyMailTo(person);
      await removeWatches();
    });

  it('is refused where it was not made here', async () => {
    const person = await subscriber();
    await room.addWatch(person);
    const other = await subscriber();
    await room.addWatch(other);
    const { raw } = await deliver(await publish('public'), person);
    const token = /\/unsubscribe\/([\w-]+)\.([\w-]+)>/.exec(raw.replace(/\r\n[ \t]+/g, ' ')) ?? [];
    const otherName = Buffer.from(other.id.replaceAll('-', ''), 'hex').toString('base64url');
    const swapped = token[2]?.replace(/^./, (sign) => sign === 'A' ? 'B' : 'A');
    for (const forged of [`${otherName}.${token[2]}`, `${token[1]}.${swapped}`, `${token[1]}.`,
      `${token[1]}`, 'x', '%00.%00']) {
      expect((await post(`${app.baseUrl}/unsubscribe/${forged}`)).status, forged).toBe(404);
    }
    expect([await isPaused(person), await isPaused(other)]).toEqual([false, false]);
    await removeWatches();
  });
});
