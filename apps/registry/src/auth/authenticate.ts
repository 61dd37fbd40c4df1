import type { RequestHandler } from 'express';
import passport from 'passport';
import { Strategy } from 'passport-http-bearer';
import type { Database } from '../database/connect.js';
import { Problem } from '../http/problem.js';
import { findPrincipal } from '../tokens/token-store.js';
import { isToken, tokenDigest } from '../tokens/token-text.js';
import type { Principal, Scope } from './principal.js';

const CHALLENGE = 'Bearer realm="thalweg"';

/** Guards of routes: bearer tokens (RFC 6750), in the header alone. A look-up that fails is an error, never an anonymous request. */
export interface Guards {
  /** Requires a valid token with this scope. */
  readonly requires: (scope: Scope) => RequestHandler;
  /** Lets a request without a token through; one that sends a token needs a valid one with the scope `read`. */
  readonly welcomes: RequestHandler;
}

/** The guards over the tokens of a database. */
export function createGuards(db: Database): Guards {
  const authenticator = new passport.Passport();
  authenticator.use(
    new Strategy((token, done) => {
      lookUp(db, token).then(
        (principal) => done(null, principal ?? false),
        (error: unknown) => done(error),
      );
    }),
  );
  const requires = (scope: Scope): RequestHandler => {
    return (request, response, next) => {
      refuseTokenElsewhere(request.query, request.body);
      const answer = (error: unknown, principal: Principal | false | null): void => {
        if (error) next(error);
        else next(admit(principal, scope, request, response.locals));
      };
      const handler = authenticator.authenticate('bearer', { session: false }, answer) as RequestHandler;
      void handler(request, response, next);
    };
  };
  const reader = requires('read');
  return {
    requires,
    welcomes: (request, response, next) => {
      if (request.headers.authorization === undefined) {
        refuseTokenElsewhere(request.query, request.body);
        next();
      } else void reader(request, response, next);
    },
  };
}

async function lookUp(db: Database, token: string): Promise<Principal | null> {
  return isToken(token) ? findPrincipal(db, tokenDigest(token)) : null;
}

/** RFC 6750 allows a token in the body and in the address; there it ends in logs, so it is refused. */
function refuseTokenElsewhere(query: unknown, body: unknown): void {
  const holds = (x: unknown): boolean => typeof x === 'object' && x !== null && 'access_token' in x;
  if (holds(query) || holds(body)) {
    throw new Problem(400, 'token-misplaced', 'Send the token in the Authorization header alone.', {
      headers: { 'WWW-Authenticate': `${CHALLENGE}, error="invalid_request"` },
    });
  }
}

function admit(
  principal: Principal | false | null,
  scope: Scope,
  request: Parameters<RequestHandler>[0],
  locals: Record<string, unknown>,
): Problem | undefined {
  if (!principal) {
    const sent = request.headers.authorization !== undefined;
    const detail = sent
      ? 'The token is not valid: it may be mistyped, expired or revoked.'
      : 'This needs a token: send Authorization: Bearer followed by it.';
    const challenge = sent ? `${CHALLENGE}, error="invalid_token"` : CHALLENGE;
    return new Problem(401, 'not-signed-in', detail, { headers: { 'WWW-Authenticate': challenge } });
  }
  if (!principal.scopes.includes(scope)) {
    return new Problem(403, 'scope-missing', `The token does not allow this: it needs the scope ${scope}.`, {
      headers: { 'WWW-Authenticate': `${CHALLENGE}, error="insufficient_scope", scope="${scope}"` },
    });
  }
  locals['principal'] = principal;
  return undefined;
}

/** The principal that a guard admitted, or null where a request came without a token. */
export function readerOf(locals: Record<string, unknown>): Principal | null {
  return (locals['principal'] as Principal | undefined) ?? null;
}

/** The principal that `requires` admitted. */
export function principalOf(locals: Record<string, unknown>): Principal {
  const principal = readerOf(locals);
  if (!principal) throw new Error('expected a guard in front of this route, found none');
  return principal;
}
