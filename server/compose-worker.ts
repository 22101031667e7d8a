import { accountLinkToken } from './accounts/account-link';
import type { Parts } from './compose';
import { system } from './db/database';
import { createDigestComposer } from './digests/digest-composer';
import { planDigests } from './digests/digest-planner';
import { createPhotoDecoder } from './images/photo-decoder';
import { openPhotoFolders } from './images/photo-store';
import { startJobQueue } from './jobs/job-queue';
import { startTicking } from './jobs/ticker';
import { createAccountMailComposers } from './mail/account-mails';
import { createMailSender } from './mail/mail-sender';
import { createMailTransport } from './mail/mail-transport';
import { createPhotosService } from './photos/photos-service';
import { findCards, nameFilterValues } from './reports/report-card-queries';
import { findFittingWords } from './reports/report-search-queries';
import { matchPublication } from './watches/watch-matching';

/** How often the ledger is looked at where nothing wakes it. */
const ledgerTickMilliseconds = 2_000;

export interface Worker {
  stop(): Promise<void>;
}

/** What runs beside the server: matching, digests, the mail ledger and the daily clean-up. */
export async function composeWorker({ config, database, logger }: Parts): Promise<Worker> {
  const domain = config.baseUrl.hostname;
  const transport = createMailTransport(config.smtpUrl, config.mailFrom);
  const sender = createMailSender({
    database, transport, logger, messageIdDomain: domain,
    composers: {
      digest: createDigestComposer(config,
        { findCards, nameValues: nameFilterValues, findFittingWords }),
      ...createAccountMailComposers(config, (id) => accountLinkToken(id, config.mailTokenKey)),
    },
  });
  const ticker = startTicking(ledgerTickMilliseconds, logger, async () => {
    await database.asActor(system, (trx) => planDigests(trx, new Date(), domain));
    while (await sender.tick() > 0) { /* until nothing is due */ }
  });
  const queue = await startJobQueue(config.databaseUrl, logger, 'work');
  await queue.boss.work<{ reportId: string; publicationId: string }>('match-watches',
    { batchSize: 5, pollingIntervalSeconds: 1 }, async (jobs) => {
      for (const { data } of jobs) {
        await database.asActor(system,
          (trx) => matchPublication(trx, data.reportId, data.publicationId));
      }
      ticker.wake();
    });
  const decoder = createPhotoDecoder();
  const photos = createPhotosService({ database, decoder,
    ...openPhotoFolders(config.photoDirectory) });
  await queue.boss.work('clean-up', async () => {
    await database.asActor(system, (trx) =>
      trx('session').where('expire', '<', trx.fn.now()).delete());
    while (await photos.removeUnused() > 0) { /* a batch at a time, until none is left */ }
  });
  await queue.boss.schedule('clean-up', '17 3 * * *');
  return {
    async stop() {
      await queue.stop();
      await ticker.stop();
      transport.close();
      decoder.close();
    },
  };
}
