import type { Express } from 'express';
import { pino } from 'pino';
import request from 'supertest';
import { inject } from 'vitest';
import { createApp } from '../../src/app.js';
import type { Scope } from '../../src/auth/principal.js';
import { connect, type Database } from '../../src/database/connect.js';
import { migrate } from '../../src/database/migrate.js';
import { insertMember } from '../../src/members/member-store.js';
import { insertToken } from '../../src/tokens/token-store.js';
import { newToken, tokenDigest } from '../../src/tokens/token-text.js';

/** A registry over a database of its own. */
export interface TestRegistry {
  /** The database as its owner. */
  readonly owner: Database;
  /** The database as the server sees it. */
  readonly db: Database;
  readonly app: Express;
  readonly http: ReturnType<typeof request>;
  /** A new member with a token. */
  readonly addMember: (name: string, scopes?: readonly Scope[]) => Promise<{ memberId: string; token: string }>;
  readonly close: () => Promise<void>;
}

let made = 0;

/** Makes a database with the present schema on the server of the tests, and the application over it. */
export async function testRegistry(): Promise<TestRegistry> {
  const server = inject('databaseServer');
  const name = `registry_${process.pid}_${(made += 1)}`;
  const root = connect(`${server}/postgres`);
  await root.raw(`create database ${name}`);
  const owner = connect(`${server}/${name}`);
  await migrate(owner);
  const url = new URL(`${server}/${name}`);
  url.username = 'thalweg_application';
  const db = connect(url.href);
  const app = createApp({
    db,
    log: pino({ level: process.env['LOG_LEVEL'] ?? 'silent' }),
    proxyHops: 0,
    isAccepting: () => true,
  });
  return {
    owner,
    db,
    app,
    http: request(app),
    addMember: (member, scopes = ['read', 'publish', 'withdraw']) => addMember(owner, member, scopes),
    close: async () => {
      await Promise.all([db.destroy(), owner.destroy()]);
      await root.raw(`drop database ${name} with (force)`);
      await root.destroy();
    },
  };
}

async function addMember(
  owner: Database,
  name: string,
  scopes: readonly Scope[],
): Promise<{ memberId: string; token: string }> {
  const memberId = await insertMember(owner, { name, fullName: `Member ${name}` });
  const token = newToken();
  const expiresAt = new Date(Date.now() + 3_600_000);
  await insertToken(owner, { memberId, label: 'test', digest: tokenDigest(token), scopes, expiresAt });
  return { memberId, token };
}
