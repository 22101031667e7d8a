import { randomBytes, randomUUID } from 'node:crypto';
import knex, { type Knex } from 'knex';
import { accountLinkHash } from '#server/accounts/account-link';
import configuration from './knexfile';
import { readCatalogue, seedCatalogue } from './seeds/catalogue';
import { seedDemo } from './seeds/demo/seed-demo';

/**
 * `tsx database/seed.ts catalogue | demo | setup-link`, as the owner; each is safe to run again.
 * `setup-link` prints the path at which the first registrar is set up, or nothing where there is
 * one. Its token is random and only its hash is kept: each run makes a new one and voids the last.
 */
const hoursToSetUp = 24;

const database = knex(configuration);
try {
  switch (process.argv[2]) {
    case 'catalogue': {
      const { coinTypes, newRevisions } = await seedCatalogue(database, await wantedCatalogue());
      process.stdout.write(`Catalogue: ${coinTypes} coin types, ${newRevisions} new revisions.\n`);
      break;
    }
    case 'demo':
      process.stdout.write(`${await seedDemo(database, process.env)}\n`);
      break;
    case 'setup-link':
      process.stdout.write(await makeSetupLink(database));
      break;
    default:
      throw new Error('say what to seed: catalogue, demo or setup-link');
  }
} finally {
  await database.destroy();
}

/** Coins of invented issuers come with the demonstration; a registry of one's own has none. */
async function wantedCatalogue() {
  const catalogue = await readCatalogue();
  const demonstration = await database('coin_type').select('id')
    .where({ is_demonstration: true }).first();
  return demonstration ? catalogue
    : { ...catalogue, types: catalogue.types.filter((type) => !type.isDemonstration) };
}

async function makeSetupLink(owner: Knex): Promise<string> {
  const registrar = await owner('person').select('id').where({ is_registrar: true })
    .whereNull('closed_at').first();
  if (registrar) return '';
  const token = randomBytes(32).toString('base64url');
  await owner('account_link').where({ kind: 'first_registrar' }).whereNull('used_at')
    .update({ withdrawn_at: owner.fn.now() });
  await owner('account_link').insert({
    id: randomUUID(), kind: 'first_registrar', token_hash: accountLinkHash(token),
    expires_at: owner.raw(`now() + ? * interval '1 hour'`, [hoursToSetUp]),
  });
  return `/setup/${token}\n`;
}
