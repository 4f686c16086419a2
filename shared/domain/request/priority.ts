/** Urgency in FHIR's request-priority codes, most pressing last, as FHIR lists them. */
export const priorities = ['routine', 'urgent', 'asap', 'stat'] as const
export type Priority = (typeof priorities)[number]

export const priorityWords = {
  routine: 'Routine',
  urgent: 'Urgent',
  asap: 'As soon as possible',
  stat: 'Stat',
} as const satisfies Record<Priority, string>

/** Sort key: 0 is read first. */
export const priorityRank = { stat: 0, asap: 1, urgent: 2, routine: 3 } as const satisfies Record<Priority, number>
