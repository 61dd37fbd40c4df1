import express, { type Express } from 'express';
import helmet from 'helmet';
import type { Logger } from 'pino';
import { pinoHttp } from 'pino-http';
import { createGuards } from './auth/authenticate.js';
import type { Database } from './database/connect.js';
import { handleErrors, notFound } from './http/handle-errors.js';
import { healthRoutes } from './http/health-routes.js';
import { memberRoutes } from './members/member-routes.js';
import { readRoutes } from './versions/read-routes.js';
import { writeRoutes } from './versions/write-routes.js';

export interface AppParts {
  readonly db: Database;
  readonly log: Logger;
  /** Proxies in front of the server. */
  readonly proxyHops: number;
  /** Whether requests should still be sent here; false while the server stops. */
  readonly isAccepting: () => boolean;
}

/** The registry as an Express application over its parts. */
export function createApp({ db, log, proxyHops, isAccepting }: AppParts): Express {
  const app = express();
  app.set('trust proxy', proxyHops);
  app.set('query parser', 'simple');
  app.disable('etag');
  app.use(pinoHttp({ logger: log, redact: ['req.headers.authorization', 'req.headers.cookie'] }));
  app.use(
    helmet({
      contentSecurityPolicy: { useDefaults: false, directives: { defaultSrc: ["'none'"], frameAncestors: ["'none'"] } },
      strictTransportSecurity: false,
    }),
  );
  const guards = createGuards(db);
  app.use(healthRoutes(db, isAccepting));
  app.use('/api/v1', memberRoutes(guards), readRoutes(db, guards), writeRoutes(db, guards));
  app.use(notFound);
  app.use(handleErrors);
  return app;
}
