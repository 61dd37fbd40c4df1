import { Router } from 'express';
import type { Database } from '../database/connect.js';

/** `/livez`: the process answers; `/readyz`: it takes requests and its database answers. */
export function healthRoutes(db: Database, isAccepting: () => boolean): Router {
  const router = Router();
  router.get('/livez', (_request, response) => {
    response.type('text').send('live\n');
  });
  router.get('/readyz', async (_request, response) => {
    const ready = isAccepting() && (await answers(db));
    response
      .status(ready ? 200 : 503)
      .type('text')
      .send(ready ? 'ready\n' : 'not ready\n');
  });
  return router;
}

async function answers(db: Database): Promise<boolean> {
  try {
    await db.raw('select 1');
    return true;
  } catch {
    return false;
  }
}
