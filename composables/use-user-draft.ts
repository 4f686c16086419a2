import type { Role } from '#shared/domain/access/roles'
import type { UserView } from '#shared/types/views'

/** An account as it is being filled in. */
export interface UserDraft {
  name: string
  role: Role | null
  maySign: boolean
  guidanceLead: boolean
  practiceIds: string[]
}

export const emptyUserDraft: UserDraft = { name: '', role: null, maySign: false, guidanceLead: false, practiceIds: [] }

/** The account as it is, to change from. */
export function draftOf(user: UserView): UserDraft {
  return { name: user.name, role: user.role, maySign: user.maySign, guidanceLead: user.guidanceLead, practiceIds: user.practices.map(practice => practice.id) }
}

/** What a change takes away or gives, said before it is made. */
export function changeWords(before: UserView, after: UserDraft): string | null {
  const practices = before.practices.map(practice => practice.id).sort().join() !== [...after.practiceIds].sort().join()
  const rights = before.role !== after.role || before.maySign !== after.maySign || before.guidanceLead !== after.guidanceLead
  if (!practices && !rights) return null
  return 'This takes effect at once: wherever the person is signed in, they are signed out and must sign in again.'
}
