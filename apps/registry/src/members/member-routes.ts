import type { MemberDocument } from '@thalweg/format/api';
import { Router } from 'express';
import { type Guards, principalOf } from '../auth/authenticate.js';
import { documentText } from '../http/document-text.js';

/** Whose token it is and what it allows. */
export function memberRoutes(guards: Guards): Router {
  const router = Router();
  router.get('/member', guards.requires('read'), (_request, response) => {
    const { name, role, scopes } = principalOf(response.locals);
    const document: MemberDocument = { schema: 'thalweg.member/1', name, role, scopes: [...scopes] };
    response.set('Cache-Control', 'no-store').type('json').send(documentText(document));
  });
  return router;
}
