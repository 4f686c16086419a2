import type { Role } from '../access/roles'
import type { Side } from './lifecycle'

/** `query`: imaging asks. `question`: ordering asks. `answer`: whoever owed one. `note`: said without asking anything. */
export const messageKinds = ['query', 'question', 'answer', 'note'] as const
export type MessageKind = (typeof messageKinds)[number]

/** The side a role speaks for in the thread; administrators do not write in it. */
export function roleSide(role: Role): Side {
  return role === 'orderer' ? 'ordering' : 'imaging'
}
