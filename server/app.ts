import compression from 'compression';
import connectPgSimple from 'connect-pg-simple';
import express, { type Express } from 'express';
import session from 'express-session';
import type { Logger } from 'pino';
import type { Config } from './config';
import type { Database } from './db/database';
import { authenticate } from './http/authenticate';
import { clientFiles } from './http/client-files';
import { csrfProtection } from './http/csrf';
import { errorHandler, noSuchRoute } from './http/error-handler';
import { mountRoutes } from './http/mount-routes';
import { openApiDocument, openApiRoute } from './http/openapi';
import { rateLimits } from './http/rate-limits';
import type { Route } from './http/route';
import { securityHeaders } from './http/security-headers';

export interface AppParts {
  readonly config: Config;
  readonly database: Database;
  readonly logger: Logger;
  readonly routes: readonly Route[];
}

/** Weeks a person stays signed in on a device that they come back to. */
const sessionWeeks = 4;

/** Builds the web application out of parts that are already made; opens nothing itself. */
export function createApp({ config, database, logger, routes }: AppParts): Express {
  const app = express();
  const isHttps = config.baseUrl.protocol === 'https:';
  app.disable('x-powered-by');
  app.set('trust proxy', config.trustProxyHops);
  app.set('query parser', 'simple');
  app.use(securityHeaders(isHttps));
  app.use(compression());

  const PostgresStore = connectPgSimple(session);
  const signedInSession = session({
    name: sessionCookieName(isHttps),
    secret: config.sessionSecret,
    resave: false,
    saveUninitialized: false,
    rolling: false,
    store: new PostgresStore({
      pool: database.sessionPool,
      tableName: 'session',
      createTableIfMissing: false,
      disableTouch: true,
      pruneSessionInterval: false,
      errorLog: (...values: unknown[]) => logger.error({ values }, 'session store'),
    }),
    cookie: {
      httpOnly: true, sameSite: 'lax', secure: isHttps, path: '/',
      maxAge: sessionWeeks * 7 * 24 * 3600 * 1000,
    },
  });
  const csrf = csrfProtection(config);
  const all = [...routes];
  all.push(openApiRoute(() => openApiDocument(all, config.baseUrl.origin)));

  app.use('/api', express.json({ limit: '512kb' }), signedInSession, authenticate(database),
    (_request, response, next) => {
      response.set('Cache-Control', 'no-store');
      next();
    });
  mountRoutes(app, all, { csrf: csrf.check, limits: rateLimits(config) });
  app.use('/api', noSuchRoute);
  app.use(clientFiles(config.clientDirectory));
  app.use(errorHandler(logger));
  return app;
}

/** The `__Host-` prefix binds the cookie to this host and to HTTPS. */
export function sessionCookieName(isHttps: boolean): string {
  return isHttps ? '__Host-touchneedle.session' : 'touchneedle.session';
}
