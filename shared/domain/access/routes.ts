import type { Action } from './permissions'

/**
 * Every route with the action that guards it. `public` routes answer without a person and say why below. A test reads the
 * route files from disk and fails on one without a row here.
 */
export const routeActions = {
  'GET /api/me': 'me.read',
  'PUT /api/me/preferences': 'me.change',
  'POST /api/patient-searches': 'patient.search',
  'GET /api/requests': 'request.list',
  'POST /api/requests': 'request.create',
  'GET /api/requests/[id]': 'request.read',
  'PUT /api/requests/[id]/form': 'request.edit',
  'POST /api/requests/[id]/assessment': 'request.assess',
  'POST /api/requests/[id]/submission': 'request.send',
  'POST /api/requests/[id]/discard': 'request.discard',
  'POST /api/requests/[id]/withdrawal': 'request.withdraw',
  'POST /api/requests/[id]/messages': 'message.post',
  'POST /api/requests/[id]/query': 'request.query',
  'POST /api/requests/[id]/approval': 'request.approve',
  'POST /api/requests/[id]/decline': 'request.decline',
  'POST /api/requests/[id]/undo': 'request.undo',
  'POST /api/requests/[id]/reopening': 'request.reopen',
  'PUT /api/requests/[id]/booking': 'request.book',
  'POST /api/requests/[id]/booking-release': 'request.unbook',
  'POST /api/requests/[id]/refusal': 'request.refuse',
  'POST /api/requests/[id]/administration': 'request.record-given',
  'POST /api/requests/[id]/needs': 'need.mark',
  'PUT /api/requests/[id]/consent': 'consent.record',
  'GET /api/requests/[id]/letter-preview': 'letter.read',
  'POST /api/requests/[id]/letter-handover': 'letter.manage',
  'GET /api/review': 'review.list',
  'GET /api/preparation': 'preparation.list',
  'GET /api/scanners': 'scanner.list',
  'GET /api/guidance': 'guidance.read',
  'GET /api/policy': 'policy.read',
  'GET /api/users': 'user.list',
  'POST /api/users': 'user.invite',
  'PUT /api/users/[id]': 'user.change',
  'POST /api/users/[id]/invitation': 'user.change',
  'GET /api/practices': 'practice.list',
  'POST /api/practices': 'practice.change',
  'PUT /api/practices/[id]': 'practice.change',
  'GET /api/connections': 'connection.read',
  'GET /api/letters/failed': 'letter.list-failed',
  'POST /api/letters/[id]/retry': 'letter.retry',
  'GET /api/audit': 'audit.read',
  // Signing in and out: next-auth guards its own steps.
  'ANY /api/auth/[...]': 'public',
  // The token in the link is the credential; tries are counted.
  'GET /api/invitations/[token]': 'public',
  'POST /api/invitations/[token]': 'public',
  'POST /api/explanations/[token]': 'public',
  'GET /api/explanations/current': 'public',
  // The same as a plain form, for browsers without scripts; the token in the address is what no other site knows.
  'POST /explanation-form/[token]': 'public',
  // For the machine that runs it: says up or not, nothing else.
  'GET /healthz': 'public',
  'GET /readyz': 'public',
} as const satisfies Record<string, Action | 'public'>
