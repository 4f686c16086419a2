import { setting } from './settings'

/** What the fake record may be told; its README lists the faults. */
export type RecordFault = 'unreachable' | 'hang' | '500'

async function control(body: object): Promise<void> {
  const answer = await fetch(`${setting('WHEREFORE_TEST_FHIR_URL')}/__control`, { method: 'POST', body: JSON.stringify(body) })
  if (!answer.ok) throw new Error(await answer.text())
}

/** From now on the record misbehaves for every call, until `resetRecord`. */
export const breakRecord = (fault: RecordFault): Promise<void> => control({ fault })

/** The record as it was at the start: answering, with the patients of the fixtures. */
export const resetRecord = (): Promise<void> => control({ reset: true })
