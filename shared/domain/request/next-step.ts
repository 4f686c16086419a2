import type { RequestState, Side } from './lifecycle'

/** The next step and who owes it, in words; never empty, so that no request ends in silence. */
export function nextStep(row: { state: RequestState, awaiting: Side | null, replyWaiting: boolean, slotStartsAt: string | null }): string {
  if (row.awaiting === 'ordering' && row.state === 'queried') return 'The ordering side owes an answer'
  if (row.awaiting === 'imaging') return 'Imaging owes an answer'
  switch (row.state) {
    case 'draft': return 'Finish and send'
    case 'sent': return row.replyWaiting ? 'A radiologist reads the answer' : 'A radiologist decides'
    case 'queried': return 'The ordering side owes an answer'
    case 'reopened': return 'A radiologist decides again'
    case 'approved': return 'The booking desk sets a time'
    case 'booked': return 'The exam takes place'
    case 'done': return 'The patient\'s letter goes out'
    case 'closed': return 'Nothing more to do'
    case 'declined': return 'Send a corrected copy, or nothing more'
    case 'withdrawn': return 'Withdrawn: nothing more to do'
    case 'refused': return 'Talk with the patient about other ways'
    case 'discarded': return 'Discarded'
  }
}
