/** `before`: on booking. `after`: once the exam is done. `changed`: a plan the patient knew of was moved or called off. */
export const letterKinds = ['before', 'after', 'changed'] as const
export type LetterKind = (typeof letterKinds)[number]

/** `no-address`: nothing to send to, to be handed over; `handed-over`: done on paper. */
export const letterStates = ['queued', 'delivered', 'failed', 'held', 'cancelled', 'no-address', 'handed-over'] as const
export type LetterState = (typeof letterStates)[number]
