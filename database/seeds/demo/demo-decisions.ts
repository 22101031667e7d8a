import type { Database } from '#server/db/database';
import { tellReporter } from '#server/notices/notices';
import { createReportsService } from '#server/reports/reports-service';
import { recordPublication } from '#server/review/review-queries';
import { createReviewService } from '#server/review/review-service';
import type { DecisionRequest } from '#shared/review/review';
import type { DemoReport } from './scenario';

const nell = 'nell.ashgrove@larkmoor.example';
const bram = 'bram.fenlow@saltmarsh.example';
const hugo = 'hugo.pyke@embervale.example';

const reasons: Readonly<Record<string, string>> = {
  publish: 'Clear photographs, and the tells named are there. The measurements agree.',
  agree_public: 'I see the same. Nothing in it would help to mend the die.',
  return: 'Please add a photo of the edge, and weigh it with a finer scale if you can.',
  decline: 'What is described is a planchet flaw of a genuine piece.',
  unresolved: 'The photos are too dark to tell. Come back with the piece, if you can.',
};

/** Takes the report through the desk as the story says; no watch is matched to it. */
export async function decideAsDemo(
  parts: { readonly database: Database; readonly people: ReadonlyMap<string, string> },
  number: string, report: DemoReport,
): Promise<void> {
  const service = createReviewService({
    viewNewest: createReportsService().viewNewest,
    tellReporter,
    announcePublication: recordPublication,
  });
  const first = report.audience === 'club' ? bram
    : report.author.endsWith('@saltmarsh.example') ? nell : bram;
  switch (report.outcome) {
    case 'filed':
      return;
    case 'withdrawn':
      return withdraw();
    case 'in_review':
      await claim(nell);
      return;
    case 'published':
    case 'retracted':
    case 'merged':
      await decide(report.audience === 'named_clubs' ? nell : first, 'publish');
      if (report.audience === 'public' && report.secondVoice) await decide(hugo, 'agree_public');
      return;
    case 'returned':
      return decide(first, 'return');
    case 'declined':
      return decide(first, 'decline');
    case 'unresolved':
      return decide(first, 'unresolved');
  }

  async function decide(email: string, kind: DecisionRequest['kind']): Promise<void> {
    const actor = actorOf(email);
    const publishes = kind === 'publish' || kind === 'agree_public';
    await parts.database.asActor(actor, async (trx) => {
      const who = { id: actor.id, roles: ['moderator' as const] };
      const { report: seen, stage } = await service.view(trx, who, number);
      // A start that was broken off may have decided already.
      if (stage !== (kind === 'agree_public' ? 'second' : 'first')) return;
      const lease = await service.takeLease(trx, who, number);
      await service.decide(trx, who, number, {
        leaseToken: lease.token, version: seen.version, rowVersion: seen.rowVersion, kind,
        confidence: publishes ? report.confidence : null,
        basis: publishes ? report.basis : [], reason: reasons[kind] ?? '',
      });
    });
  }

  async function claim(email: string): Promise<void> {
    const actor = actorOf(email);
    await parts.database.asActor(actor, (trx) =>
      service.takeLease(trx, { id: actor.id, roles: ['moderator'] }, number));
  }

  async function withdraw(): Promise<void> {
    const actor = actorOf(report.author);
    await parts.database.asActor(actor, (trx) => trx('report')
      .where({ number, state: 'filed' }).update({ state: 'withdrawn' }));
  }

  function actorOf(email: string) {
    return { kind: 'person' as const, id: parts.people.get(email) ?? '' };
  }
}
