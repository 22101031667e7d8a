import { randomUUID } from 'node:crypto';
import type { Cadence, WatchFilter } from '#shared/watches/watch-filter';
import { system } from '#server/db/database';
import { createDigestComposer } from '#server/digests/digest-composer';
import { planDigests } from '#server/digests/digest-planner';
import { createMailSender } from '#server/mail/mail-sender';
import { createMailTransport, type MailTransport } from '#server/mail/mail-transport';
import { findCards, nameFilterValues } from '#server/reports/report-card-queries';
import { findFittingWords } from '#server/reports/report-search-queries';
import { matchPublication } from '#server/watches/watch-matching';
import type { TestPerson } from './factories/people';
import { SmtpCatcher, type CaughtMail } from './smtp-catcher';
import type { TestApp } from './test-app';

/** The steps from a publication to a digest, each taken by hand over the test's database. */
export class MailRoom {
  private readonly transport: MailTransport;

  private constructor(readonly app: TestApp, readonly catcher: SmtpCatcher) {
    this.transport = createMailTransport(catcher.url, app.config.mailFrom);
  }

  static async open(app: TestApp): Promise<MailRoom> {
    return new MailRoom(app, await new SmtpCatcher().start());
  }

  /** A live watch, past its door. */
  async addWatch(person: TestPerson, filter: WatchFilter = {}, more: {
    readonly name?: string; readonly cadence?: Cadence;
  } = {}): Promise<string> {
    const id = randomUUID();
    await this.app.store.owner('watch').insert({ id, person_id: person.id,
      name: more.name ?? 'Everything', cadence: more.cadence ?? 'at_once',
      filter: JSON.stringify(filter) });
    return id;
  }

  /** Holds the standing publication of the report against every watch. */
  async match(number: string): Promise<number> {
    const publication = await this.app.store.owner('publication')
      .join('report', 'report.id', 'publication.report_id').where({ number })
      .whereRaw('upper_inf(publication.during)').first('publication.id', 'report_id');
    return this.app.database.asActor(system,
      (trx) => matchPublication(trx, publication.report_id, publication.id));
  }

  plan(now = new Date()): Promise<number> {
    return this.app.database.asActor(system,
      (trx) => planDigests(trx, now, this.app.config.baseUrl.hostname));
  }

  /** Sends until nothing is due. */
  async send(): Promise<void> {
    const { app } = this;
    const sender = createMailSender({
      database: app.database, transport: this.transport, logger: app.logger,
      messageIdDomain: app.config.baseUrl.hostname,
      composers: { digest: createDigestComposer(app.config,
        { findCards, nameValues: nameFilterValues, findFittingWords }) },
    });
    while (await sender.tick() > 0) { /* until nothing is due */ }
  }

  mailsTo(person: TestPerson): CaughtMail[] {
    return this.catcher.mailsTo(person.email);
  }

  async close(): Promise<void> {
    this.transport.close();
    await this.catcher.stop();
  }
}
