import pino from 'pino';
import { composeWorker } from './compose-worker';
import { readConfig } from './config';
import { openDatabase } from './db/database';

const config = readConfig(process.env);
const logger = pino({ level: config.logLevel, name: 'worker' });
const database = openDatabase(config.databaseUrl, 5,
  (error) => logger.warn({ err: error }, 'idle database connection lost'));
const worker = await composeWorker({ config, database, logger });
logger.info('working');

let stopping = false;
function stop(): void {
  if (stopping) return;
  stopping = true;
  void worker.stop().then(() => database.close()).then(() => process.exit(0));
}
process.on('SIGTERM', stop);
process.on('SIGINT', stop);
