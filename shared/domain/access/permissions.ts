import type { RequestState } from '../request/lifecycle'
import type { Actor, Role } from './roles'

/** What a rule may look at of a request. */
export interface RequestScope {
  practiceId: string
  state: RequestState
  preparedById: string
  signedById: string | null
}

/** What a rule may look at of a user account. */
export interface UserScope { userId: string }

type OnRequest = (actor: Actor, row: RequestScope) => boolean
type OnUser = (actor: Actor, row: UserScope) => boolean

interface Cells<Rule> { orderer: Rule, radiologist: Rule, scheduler: Rule, administrator: Rule }
/** `true` allows, `false` forbids, a predicate decides on the row. */
type RequestCells = Cells<boolean | OnRequest>
type UserCells = Cells<boolean | OnUser>
type PlainCells = Cells<boolean>

const ownPractice: OnRequest = (actor, row) => actor.practiceIds.includes(row.practiceId)
const ownDraft: OnRequest = (actor, row) => ownPractice(actor, row) && row.state === 'draft'
const ownAndSigns: OnRequest = (actor, row) => ownPractice(actor, row) && actor.maySign
const beyondDraft: OnRequest = (_actor, row) => row.state !== 'draft' && row.state !== 'discarded'
/** Somebody who asked for the exam never decides it. */
const signsForOthers: OnRequest = (actor, row) =>
  beyondDraft(actor, row) && actor.maySign && row.signedById !== actor.userId && row.preparedById !== actor.userId
const toBePrepared: OnRequest = (_actor, row) =>
  ['approved', 'booked', 'reopened', 'queried', 'done', 'closed', 'refused', 'sent', 'withdrawn', 'declined'].includes(row.state)
const notSelf: OnUser = (actor, row) => actor.userId !== row.userId

const nobody = { orderer: false, radiologist: false, scheduler: false, administrator: false } as const
const everyone = { orderer: true, radiologist: true, scheduler: true, administrator: true } as const

/** Actions on one request: the row decides. */
export const requestPermissions = {
  'request.read': { ...nobody, orderer: ownPractice, radiologist: beyondDraft, scheduler: toBePrepared },
  'request.edit': { ...nobody, orderer: ownDraft },
  'request.assess': { ...nobody, orderer: ownPractice, radiologist: beyondDraft },
  'request.send': { ...nobody, orderer: ownAndSigns },
  'request.discard': { ...nobody, orderer: ownDraft },
  'request.withdraw': { ...nobody, orderer: ownAndSigns },
  'request.resend': { ...nobody, orderer: ownPractice },
  'message.post': { ...nobody, orderer: ownPractice, radiologist: beyondDraft, scheduler: toBePrepared },
  'request.query': { ...nobody, radiologist: signsForOthers },
  'request.approve': { ...nobody, radiologist: signsForOthers },
  'request.decline': { ...nobody, radiologist: signsForOthers },
  'request.undo': { ...nobody, radiologist: signsForOthers },
  'request.reopen': { ...nobody, radiologist: signsForOthers },
  'request.book': { ...nobody, scheduler: toBePrepared },
  'request.unbook': { ...nobody, scheduler: toBePrepared },
  'request.refuse': { ...nobody, scheduler: toBePrepared },
  'request.record-given': { ...nobody, radiologist: beyondDraft, scheduler: toBePrepared },
  'need.mark': { ...nobody, radiologist: beyondDraft, scheduler: toBePrepared },
  'letter.read': { ...nobody, orderer: ownPractice, radiologist: beyondDraft, scheduler: toBePrepared },
  'letter.manage': { ...nobody, scheduler: toBePrepared },
  'consent.record': { ...nobody, orderer: ownPractice, scheduler: toBePrepared },
} as const satisfies Record<string, RequestCells>

/** Actions on a user account. */
export const userPermissions = {
  'user.change': { ...nobody, administrator: notSelf },
} as const satisfies Record<string, UserCells>

/** Actions that no single row decides; lists are scoped inside their query. */
export const plainPermissions = {
  'me.read': everyone,
  'me.change': everyone,
  'patient.search': { ...nobody, orderer: true },
  'request.create': { ...nobody, orderer: true },
  'request.list': { ...everyone, administrator: false },
  'review.list': { ...nobody, radiologist: true },
  'preparation.list': { ...nobody, scheduler: true, radiologist: true },
  'guidance.read': everyone,
  'policy.read': everyone,
  'scanner.list': { ...everyone },
  'user.list': { ...nobody, administrator: true },
  'user.invite': { ...nobody, administrator: true },
  'practice.list': { ...nobody, administrator: true },
  'practice.change': { ...nobody, administrator: true },
  'connection.read': { ...nobody, administrator: true },
  'letter.list-failed': { ...nobody, administrator: true, scheduler: true },
  'letter.retry': { ...nobody, administrator: true, scheduler: true },
  'audit.read': { ...nobody, administrator: true },
} as const satisfies Record<string, PlainCells>

export type RequestAction = keyof typeof requestPermissions
export type UserAction = keyof typeof userPermissions
export type PlainAction = keyof typeof plainPermissions
export type Action = RequestAction | UserAction | PlainAction

const requestTable: Record<RequestAction, RequestCells> = requestPermissions
const userTable: Record<UserAction, UserCells> = userPermissions
const plainTable: Record<PlainAction, PlainCells> = plainPermissions

export function isRequestAction(action: Action): action is RequestAction {
  return action in requestTable
}

export function isUserAction(action: Action): action is UserAction {
  return action in userTable
}

/** Whether the role may ever do it; rows may still forbid. Navigation and routes ask this first. */
export function roleMay(role: Role, action: Action): boolean {
  if (isRequestAction(action)) return requestTable[action][role] !== false
  if (isUserAction(action)) return userTable[action][role] !== false
  return plainTable[action][role]
}

/** Whether the row must be looked at before the answer is known. */
export function needsRow(role: Role, action: Action): boolean {
  if (isRequestAction(action)) return typeof requestTable[action][role] === 'function'
  if (isUserAction(action)) return typeof userTable[action][role] === 'function'
  return false
}

/** Whether the actor may do this to this request. Screens and server both ask here. */
export function mayOnRequest(actor: Actor, action: RequestAction, row: RequestScope): boolean {
  const rule = requestTable[action][actor.role]
  return typeof rule === 'function' ? rule(actor, row) : rule
}

/** Whether the actor may do this to this account. */
export function mayOnUser(actor: Actor, action: UserAction, row: UserScope): boolean {
  const rule = userTable[action][actor.role]
  return typeof rule === 'function' ? rule(actor, row) : rule
}
