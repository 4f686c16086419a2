import { randomUUID } from 'node:crypto'
import type { RequestScope } from '#shared/domain/access/permissions'
import type { Actor } from '#shared/domain/access/roles'
import type { Database } from '#server/database/client'
import { patients, requests } from '#server/database/schema/requests'
import { readyForm } from '../../support/department'

/** A body for each write that passes its schema, so that an answer speaks of permission and not of a form. */
export const validBodies: Record<string, object> = {
  'PUT /api/me/preferences': { shortcuts: true },
  'POST /api/patient-searches': { name: 'Lindqvist' },
  'POST /api/requests': { ehrPatientId: 'p1', practiceId: randomUUID(), confirmed: true, copyOf: null },
  'PUT /api/requests/[id]/form': { form: readyForm },
  'POST /api/requests/[id]/discard': {},
  'POST /api/requests/[id]/withdrawal': { reason: 'No longer needed.' },
  'POST /api/requests/[id]/messages': { kind: 'note', body: 'Please call the ward.', internal: false },
  'POST /api/requests/[id]/query': { body: 'Which side?' },
  'POST /api/requests/[id]/approval': {
    contrast: 'none', agent: null, doseMmolPerKg: null, weightKg: null, volumeMl: null, note: '', differsReason: 'A reason.', wordGiven: false, waivedNeeds: [],
  },
  'POST /api/requests/[id]/decline': { reason: 'An ultrasound answers this.', helpInstead: 'Ultrasound.' },
  'POST /api/requests/[id]/reopening': { reason: 'New facts.' },
  'PUT /api/requests/[id]/booking': { scannerId: randomUUID(), startsAt: '2030-01-07T15:00:00Z', minutes: 30 },
  'POST /api/requests/[id]/booking-release': { cause: 'moved-by-us', note: '' },
  'POST /api/requests/[id]/refusal': { reason: 'The patient does not want it.' },
  'POST /api/requests/[id]/administration': {
    contrast: 'none', agent: null, volumeMl: null, lot: '', givenAt: '2026-01-07T15:00:00Z', differsCause: null, differsReason: '', reaction: 'none', reactionDetail: '', extravasation: false,
  },
  'POST /api/requests/[id]/needs': { kind: 'creatinine', state: 'arranged', note: '' },
  'PUT /api/requests/[id]/consent': { detailsByEmail: true, email: null },
  'POST /api/requests/[id]/letter-handover': {},
  'POST /api/users': { name: 'New Person', email: 'new.person@northshore.example', role: 'scheduler', maySign: false, guidanceLead: false, practiceIds: [] },
  'PUT /api/users/[id]': { name: 'Ruth Adler', role: 'administrator', maySign: false, guidanceLead: false, practiceIds: [], disabled: false },
  'POST /api/practices': { name: 'Lakeside Clinic', phone: '', disabled: false },
  'PUT /api/practices/[id]': { name: 'Lakeside Clinic', phone: '', disabled: false },
}

/** A request of the clinician's own practice, written straight into the table. */
export async function insertRequest(db: Database, clinician: Actor, state: 'draft' | 'sent'): Promise<{ id: string, scope: RequestScope }> {
  const [patient] = await db.insert(patients).values({
    ehrId: randomUUID(), recordNumber: `R-${state}`, familyName: 'Hale', givenName: 'Nora', displayName: 'Nora Hale', birthDate: '1965-03-04', sex: 'female', readAt: new Date(),
  }).returning({ id: patients.id })
  const practiceId = clinician.practiceIds[0]
  if (!patient || !practiceId) throw new Error('no patient or practice')
  const signed = state === 'sent' ? { reference: 'WF-26-900001', signedById: clinician.userId, sentAt: new Date(), dueAt: new Date() } : {}
  const [request] = await db.insert(requests).values({
    state, practiceId, patientId: patient.id, preparedById: clinician.userId, form: readyForm, ...signed,
  }).returning({ id: requests.id })
  if (!request) throw new Error('no request')
  return { id: request.id, scope: { practiceId, state, preparedById: clinician.userId, signedById: state === 'sent' ? clinician.userId : null } }
}
