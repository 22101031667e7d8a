import { createServer } from 'node:http';
import pino from 'pino';
import { createApp } from './app';
import { composeRoutes } from './compose';
import { readConfig } from './config';
import { openDatabase } from './db/database';

const config = readConfig(process.env);
const logger = pino({ level: config.logLevel, name: 'server' });
const database = openDatabase(config.databaseUrl, config.databasePoolSize,
  (error) => logger.warn({ err: error }, 'idle database connection lost'));
const { routes, stop: stopRoutes } = await composeRoutes({ config, database, logger });
const app = createApp({ config, database, logger, routes });
const server = createServer(app);
server.listen(config.port, config.host, () => {
  logger.info({ address: config.baseUrl.origin }, 'listening');
});

let stopping = false;
/** Answers what is under way, then closes the pools. */
function stop(): void {
  if (stopping) return;
  stopping = true;
  server.close(() => void stopRoutes().then(() => database.close())
    .then(() => process.exit(0)));
  server.closeIdleConnections();
  setTimeout(() => server.closeAllConnections(), 3_000).unref();
}
process.on('SIGTERM', stop);
process.on('SIGINT', stop);
