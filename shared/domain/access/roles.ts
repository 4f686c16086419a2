export const roles = ['orderer', 'radiologist', 'scheduler', 'administrator'] as const
export type Role = (typeof roles)[number]

export const roleWords = {
  orderer: 'Ordering clinician',
  radiologist: 'Radiologist',
  scheduler: 'Scheduler',
  administrator: 'Administrator',
} as const satisfies Record<Role, string>

/** Where each role's own work begins. */
export const roleHome = {
  orderer: '/requests',
  radiologist: '/review',
  scheduler: '/preparation',
  administrator: '/settings/users',
} as const satisfies Record<Role, string>

/** Who acts, as every rule sees them; built from the database on each request, never from the cookie. */
export interface Actor {
  userId: string
  name: string
  role: Role
  /** Orderers: may sign what staff prepare. Radiologists: may sign decisions. */
  maySign: boolean
  guidanceLead: boolean
  practiceIds: readonly string[]
}
