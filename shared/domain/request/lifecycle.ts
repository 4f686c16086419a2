import type { Role } from '../access/roles'

/** The states of a request, from first key press to the last letter. */
export const requestStates = [
  'draft', 'sent', 'queried', 'approved', 'booked', 'done', 'closed', 'declined', 'withdrawn', 'refused', 'reopened', 'discarded',
] as const
export type RequestState = (typeof requestStates)[number]

export const stateWords = {
  draft: 'Draft',
  sent: 'Waiting for a radiologist',
  queried: 'Query open',
  approved: 'Approved, not booked',
  booked: 'Booked',
  done: 'Exam done',
  closed: 'Closed',
  declined: 'Declined',
  withdrawn: 'Withdrawn',
  refused: 'Patient declined the exam',
  reopened: 'Reopened',
  discarded: 'Discarded',
} as const satisfies Record<RequestState, string>

/** Work nobody has finished; lists and counts over open work look at these only. */
export const openStates = ['draft', 'sent', 'queried', 'approved', 'booked', 'done', 'reopened'] as const satisfies readonly RequestState[]

/** Which side owes the next answer in the thread. */
export const sides = ['ordering', 'imaging'] as const
export type Side = (typeof sides)[number]

export const transitions = [
  { name: 'send', from: ['draft'], to: 'sent', by: ['orderer'] },
  { name: 'discard', from: ['draft'], to: 'discarded', by: ['orderer'] },
  { name: 'query', from: ['sent', 'reopened'], to: 'queried', by: ['radiologist'] },
  { name: 'answer', from: ['queried'], to: 'sent', by: ['orderer', 'radiologist', 'scheduler'] },
  { name: 'approve', from: ['sent', 'reopened'], to: 'approved', by: ['radiologist'] },
  { name: 'decline', from: ['sent', 'reopened'], to: 'declined', by: ['radiologist'] },
  { name: 'undo', from: ['approved', 'declined'], to: 'sent', by: ['radiologist'] },
  { name: 'book', from: ['approved'], to: 'booked', by: ['scheduler'] },
  { name: 'rebook', from: ['booked'], to: 'booked', by: ['scheduler'] },
  { name: 'unbook', from: ['booked'], to: 'approved', by: ['scheduler'] },
  { name: 'reopen', from: ['approved', 'booked'], to: 'reopened', by: ['radiologist', 'system'] },
  { name: 'complete', from: ['booked'], to: 'done', by: ['scheduler', 'radiologist'] },
  { name: 'refuse', from: ['approved', 'booked'], to: 'refused', by: ['scheduler'] },
  { name: 'close', from: ['done'], to: 'closed', by: ['system'] },
  { name: 'withdraw', from: ['sent', 'queried', 'reopened', 'approved', 'booked'], to: 'withdrawn', by: ['orderer'] },
] as const satisfies readonly {
  name: string
  from: readonly RequestState[]
  to: RequestState
  by: readonly (Role | 'system')[]
}[]

export type TransitionName = (typeof transitions)[number]['name']

export type TransitionResult =
  | { ok: true, to: RequestState }
  | { ok: false, why: 'state' | 'role' }

/**
 * The state after a transition, or why it may not happen. A request approved while its slot still stands goes
 * back to `booked`: the caller passes `keepsSlot`.
 */
export function transition(
  from: RequestState,
  name: TransitionName,
  by: Role | 'system',
  options: { keepsSlot?: boolean } = {},
): TransitionResult {
  const row = transitions.find(candidate => candidate.name === name)
  if (!row || !(row.from as readonly RequestState[]).includes(from)) return { ok: false, why: 'state' }
  if (!(row.by as readonly (Role | 'system')[]).includes(by)) return { ok: false, why: 'role' }
  if (name === 'approve' && options.keepsSlot) return { ok: true, to: 'booked' }
  return { ok: true, to: row.to }
}

/** Seconds in which the same radiologist may take a decision back; later only by reopening. */
export const undoSeconds = 60

/** Whether a corrected copy may start from a request in this state: one that came to nothing, for a reason that can be put right. */
export function mayBeCopied(state: RequestState): boolean {
  return state === 'declined' || state === 'withdrawn'
}

/** Whether the state allows the transition at all, whoever asks. */
export function isTransition(from: RequestState, name: TransitionName): boolean {
  return transitions.some(row => row.name === name && (row.from as readonly RequestState[]).includes(from))
}
