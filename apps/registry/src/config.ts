import { z } from 'zod';

const environment = z.object({
  DATABASE_URL: z.url({ protocol: /^postgres(ql)?$/, error: 'expected DATABASE_URL, postgres://user@host:port/name' }),
  HOST: z.string().default('127.0.0.1'),
  PORT: z.coerce.number().int().min(0).max(65535).default(8080),
  /** Address under which readers reach the registry, without a slash at the end. */
  PUBLIC_URL: z.url().optional(),
  LOG_LEVEL: z.enum(['fatal', 'error', 'warn', 'info', 'debug', 'silent']).default('info'),
  /** How many proxies stand in front. */
  PROXY_HOPS: z.coerce.number().int().min(0).max(8).default(0),
});

/** Settings of the server. */
export interface Config {
  readonly databaseUrl: string;
  readonly host: string;
  readonly port: number;
  readonly publicUrl: string | null;
  readonly logLevel: string;
  readonly proxyHops: number;
}

/** Settings from the environment; throws an error that names every variable at fault. */
export function readConfig(variables: Readonly<Record<string, string | undefined>>): Config {
  const parsed = environment.safeParse(variables);
  if (!parsed.success) {
    const faults = parsed.error.issues.map(({ path, message }) => `${path.join('.')}: ${message}`);
    throw new Error(`The environment is not complete.\n${faults.join('\n')}`);
  }
  const { DATABASE_URL, HOST, PORT, PUBLIC_URL, LOG_LEVEL, PROXY_HOPS } = parsed.data;
  return {
    databaseUrl: DATABASE_URL,
    host: HOST,
    port: PORT,
    publicUrl: PUBLIC_URL ?? null,
    logLevel: LOG_LEVEL,
    proxyHops: PROXY_HOPS,
  };
}
