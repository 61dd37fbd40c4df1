import { Command, Option } from 'commander';
import { readConfig } from './config.js';
import { connect, type Database } from './database/connect.js';
import { migrate } from './database/migrate.js';
import { findMember, insertMember } from './members/member-store.js';
import { serve } from './serve.js';
import { insertToken } from './tokens/token-store.js';
import { newToken, tokenDigest } from './tokens/token-text.js';
import type { Scope } from './auth/principal.js';

const DAY = 86_400_000;
const SCOPES: readonly Scope[] = ['read', 'publish', 'withdraw'];

const program = new Command('thalweg-registry')
  .description('The registry of example generators, and its administration. DATABASE_URL names the database.')
  .showHelpAfterError();

program
  .command('serve')
  .description('answer requests until interrupted')
  .action(async () => {
    const server = await serve(readConfig(process.env));
    process.stdout.write(`The registry answers at ${server.address}\n`);
    await new Promise((resolve) => {
      process.once('SIGINT', resolve);
      process.once('SIGTERM', resolve);
    });
    await server.stop();
  });

program
  .command('migrate')
  .description('bring the database, as its owner, to the present schema')
  .action(() =>
    withDatabase(async (db) => {
      const names = await migrate(db);
      process.stdout.write(names.length > 0 ? `${names.join('\n')}\n` : 'The schema is up to date.\n');
    }),
  );

program
  .command('add-member')
  .description('add a member, as the owner of the database')
  .argument('<name>', '2 to 39 characters a-z, 0-9 and single hyphens')
  .requiredOption('--full-name <text>', 'as it is printed in citations')
  .addOption(new Option('--role <role>').choices(['member', 'reviewer', 'administrator']).default('member'))
  .action((name: string, { fullName, role }: { fullName: string; role: string }) =>
    withDatabase(async (db) => {
      await insertMember(db, { name, fullName, role });
      process.stdout.write(`${name} is a ${role}.\n`);
    }),
  );

program
  .command('issue-token')
  .description('print a new token of a member, once')
  .argument('<name>')
  .requiredOption('--label <text>', 'what it is for')
  .addOption(new Option('--scope <scopes...>').choices([...SCOPES]).default(['read']))
  .addOption(new Option('--days <n>', 'valid for').default(90).argParser(Number))
  .action((name: string, { label, scope, days }: { label: string; scope: Scope[]; days: number }) =>
    withDatabase(async (db) => {
      const memberId = await findMember(db, name);
      if (memberId === null) throw new Error(`expected the name of a member, got ${name}; add it with add-member`);
      if (!(days > 0 && days <= 366)) throw new Error(`expected 1 to 366 days, got ${days}`);
      const token = newToken();
      const expiresAt = new Date(Date.now() + days * DAY);
      await insertToken(db, { memberId, label, digest: tokenDigest(token), scopes: scope, expiresAt });
      process.stdout.write(`${token}\n`);
    }),
  );

async function withDatabase(work: (db: Database) => Promise<void>): Promise<void> {
  const db = connect(readConfig(process.env).databaseUrl);
  try {
    await work(db);
  } finally {
    await db.destroy();
  }
}

try {
  await program.parseAsync();
} catch (error) {
  process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`);
  process.exitCode = 1;
}
