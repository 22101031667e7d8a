import { mkdtemp, rm } from 'node:fs/promises';
import { createServer, type Server } from 'node:http';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { AddressInfo } from 'node:net';
import pino, { type Logger } from 'pino';
import { createApp } from '#server/app';
import { composeRoutes } from '#server/compose';
import { readConfig, type Config } from '#server/config';
import { openDatabase, type Database } from '#server/db/database';
import type { Route } from '#server/http/route';
import { TestClient } from './test-client';
import { createTestDatabase, type TestDatabase } from './test-database';

export interface LogLine {
  readonly level: number;
  readonly msg: string;
  readonly [key: string]: unknown;
}

export interface TestApp {
  readonly config: Config;
  readonly baseUrl: string;
  readonly database: Database;
  readonly store: TestDatabase;
  readonly routes: readonly Route[];
  readonly logger: Logger;
  /** What was logged at warning or above. */
  readonly log: readonly LogLine[];
  /** A browser of its own: cookies and XSRF token as Angular keeps them. */
  client(): TestClient;
  stop(): Promise<void>;
}

/** The whole application on a free port, over a database of its own. */
export async function startTestApp(
  overrides: Readonly<Record<string, string>> = {},
): Promise<TestApp> {
  const store = await createTestDatabase();
  const photoDirectory = await mkdtemp(join(tmpdir(), 'touchneedle-photos-'));
  const server = createServer();
  const port = await listen(server);
  const config = readConfig({
    TOUCHNEEDLE_ENV: 'test',
    PORT: String(port),
    BASE_URL: `http://127.0.0.1:${port}`,
    DATABASE_URL: store.appUrl,
    SESSION_SECRET: 's'.repeat(32),
    REPORT_NUMBER_KEY: 'n'.repeat(32),
    MAIL_TOKEN_KEY: 'm'.repeat(32),
    PHOTO_DIRECTORY: photoDirectory,
    RATE_LIMITS: 'off',
    ...overrides,
  });
  const log: LogLine[] = [];
  const logger = pino({ level: 'warn' }, { write: (line: string) => log.push(JSON.parse(line)) });
  const database = openDatabase(config.databaseUrl, config.databasePoolSize,
    (error) => logger.warn({ err: error }, 'idle database connection lost'));
  const { routes, stop: stopRoutes } = await composeRoutes({ config, database, logger });
  server.on('request', createApp({ config, database, logger, routes }));
  return {
    config, baseUrl: config.baseUrl.origin, database, store, routes, logger, log,
    client: () => new TestClient(config.baseUrl.origin),
    async stop() {
      server.closeAllConnections();
      await new Promise((resolve) => server.close(resolve));
      await stopRoutes();
      await database.close();
      await store.drop();
      await rm(photoDirectory, { recursive: true, force: true });
    },
  };
}

function listen(server: Server): Promise<number> {
  return new Promise((resolve) => server.listen(0, '127.0.0.1', () => {
    resolve((server.address() as AddressInfo).port);
  }));
}
