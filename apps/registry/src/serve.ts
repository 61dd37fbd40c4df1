import { createServer, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { pino } from 'pino';
import { createApp } from './app.js';
import type { Config } from './config.js';
import { connect } from './database/connect.js';

/** Longest time that requests under way are waited for when the server stops. */
const STOP_MILLISECONDS = 8000;

export interface RunningServer {
  readonly address: string;
  /** Takes no more requests, finishes those under way, closes the database. */
  readonly stop: () => Promise<void>;
}

/** Starts the server of a configuration; the database must have the present schema. */
export async function serve(config: Config): Promise<RunningServer> {
  const log = pino({ level: config.logLevel });
  const db = connect(config.databaseUrl);
  let accepting = true;
  const app = createApp({ db, log, proxyHops: config.proxyHops, isAccepting: () => accepting });
  const server = createServer({ requestTimeout: 60_000, headersTimeout: 15_000 }, app);
  try {
    await listen(server, config);
  } catch (error) {
    await db.destroy();
    throw error;
  }
  const { address, port } = server.address() as AddressInfo;
  return {
    address: config.publicUrl ?? `http://${address}:${port}`,
    stop: async () => {
      accepting = false;
      await close(server);
      await db.destroy();
    },
  };
}

function listen(server: Server, { host, port }: Config): Promise<void> {
  return new Promise((resolve, reject) => {
    server.once('error', (error: NodeJS.ErrnoException) => {
      const taken = error.code === 'EADDRINUSE';
      reject(taken ? new Error(`expected a free port, got ${port}, which another program uses; set PORT`) : error);
    });
    server.listen(port, host, resolve);
  });
}

function close(server: Server): Promise<void> {
  return new Promise((resolve) => {
    const hurry = setTimeout(() => server.closeAllConnections(), STOP_MILLISECONDS);
    server.close(() => {
      clearTimeout(hurry);
      resolve();
    });
    server.closeIdleConnections();
  });
}
