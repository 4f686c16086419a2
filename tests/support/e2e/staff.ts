import { z } from 'zod'
import { demoPassPhrase } from '../../../server/database/seed/demo-users.mjs'
import { createVisitor } from '../visitor'
import type { SendOptions, Visitor } from '../visitor'
import { origin } from './settings'

/** What tests and pictures need prepared before the screen they are about: done through the server's own routes, as staff would. */

const writeSchema = z.object({ id: z.string(), reference: z.string().nullable(), state: z.string(), version: z.number() })
export type Written = z.output<typeof writeSchema>
const viewSchema = writeSchema.extend({
  form: z.looseObject({ screening: z.looseObject({}) }),
  record: z.looseObject({ hints: z.array(z.object({ field: z.string(), value: z.unknown() })) }).nullable(),
  assessment: z.looseObject({
    suggestion: z.string().nullable(),
    agents: z.looseObject({ best: z.string().nullable(), ranked: z.array(z.looseObject({ agent: z.string() })) }).nullable(),
  }).nullable(),
  decision: z.looseObject({ agent: z.string().nullable(), volumeMl: z.number().nullable(), contrast: z.string().nullable() }).nullable(),
})

const guidanceSchema = z.looseObject({
  guidance: z.looseObject({
    questions: z.array(z.looseObject({
      id: z.string(),
      region: z.string(),
      deciders: z.array(z.looseObject({ id: z.string(), kind: z.string(), options: z.array(z.looseObject({ id: z.string() })).optional() })),
    })),
  }),
})

/** No to every safety question: what a healthy patient's clinician answers. */
const healthy = {
  kidneyDisease: 'no', kidneyRiskFactor: 'no', dialysis: 'none', acuteIllness: 'no', liverDisease: 'no', earlierReaction: 'no', asthma: 'no',
  pregnancy: 'no', breastfeeding: 'no', nephrogenicSystemicFibrosis: 'no', implants: 'no',
}

export interface Asking {
  recordNumber: string
  questionId: string
  /** What decides, where it is not the usual: no to each, or the first choice. */
  answers?: Record<string, string>
  screening?: Record<string, unknown>
  /** Anything else of the form. */
  form?: Record<string, unknown>
}

export interface Staff {
  visitor: Visitor
  /** Where a search for a patient looks at this moment: in the hospital record, or among those known here while it is away. */
  searchedIn: (recordNumber: string) => Promise<string>
  /** A draft with nothing answered yet. */
  begin: (recordNumber: string) => Promise<Written>
  /** A draft of one patient, answered to the end. */
  draft: (asking: Asking) => Promise<Written>
  /** A request as sent to imaging. */
  send: (asking: Asking) => Promise<Written>
  query: (request: Written, body: string) => Promise<Written>
  answer: (request: Written, body: string) => Promise<Written>
  /** Signs the suggestion as it stands. */
  approve: (request: Written, more?: Record<string, unknown>) => Promise<Written>
  decline: (request: Written, reason: string, helpInstead?: string) => Promise<Written>
  book: (request: Written, slot: { scanner: string, startsAt: string, minutes?: number }) => Promise<Written>
  /** Records what was signed as given. */
  give: (request: Written, more?: Record<string, unknown>) => Promise<Written>
  view: (request: Pick<Written, 'id'>) => Promise<z.output<typeof viewSchema>>
}

async function must<T extends z.ZodType>(schema: T, answer: Response, what: string): Promise<z.output<T>> {
  const text = await answer.text()
  if (!answer.ok) throw new Error(`${what}: ${answer.status} ${text}`)
  return schema.parse(JSON.parse(text))
}

/** Somebody of the department at work through the routes. */
export async function staff(email: string, at = origin()): Promise<Staff> {
  const visitor = createVisitor(at)
  const status = await visitor.signIn(email, demoPassPhrase)
  if (status !== 200) throw new Error(`${email} could not sign in: ${status}`)

  const view: Staff['view'] = async ({ id }) => await must(viewSchema, await visitor.get(`/api/requests/${id}`), 'reading a request')
  /** The version is read just before: what is prepared here never races. */
  async function write(name: string, request: Pick<Written, 'id'>, body: object, method: 'POST' | 'PUT' = 'POST', options: SendOptions = {}): Promise<Written> {
    const { version } = await view(request)
    return await must(writeSchema, await visitor.send(method, `/api/requests/${request.id}/${name}`, body, { version, ...options }), name)
  }

  const begin: Staff['begin'] = async (recordNumber) => {
    const found = await must(z.object({ patients: z.array(z.object({ ehrId: z.string() })) }), await visitor.send('POST', '/api/patient-searches', { recordNumber }), 'searching')
    const me = await must(z.object({ practices: z.array(z.object({ id: z.string() })) }), await visitor.get('/api/me'), 'reading who I am')
    return await must(writeSchema, await visitor.send('POST', '/api/requests', {
      ehrPatientId: found.patients[0]?.ehrId, practiceId: me.practices[0]?.id, confirmed: true, copyOf: null,
    }), 'beginning a request')
  }

  const draft: Staff['draft'] = async ({ recordNumber, questionId, answers = {}, screening = {}, form = {} }) => {
    const begun = await begin(recordNumber)
    const { guidance } = await must(guidanceSchema, await visitor.get('/api/guidance'), 'reading the guidance')
    const question = guidance.questions.find(candidate => candidate.id === questionId)
    if (!question) throw new Error(`the guidance holds no ${questionId}`)
    const usual = Object.fromEntries(question.deciders.map(({ id, options }) => [id, options?.[0]?.id ?? 'no']))
    const before = await view(begun)
    const asked = new Set(Object.keys(before.form.screening))
    const hints = Object.fromEntries((before.record?.hints ?? []).filter(hint => asked.has(hint.field)).map(hint => [hint.field, hint.value]))
    return await write('form', begun, {
      form: {
        ...before.form,
        region: question.region,
        questionId,
        answers: { ...usual, ...answers },
        history: 'Headaches for six weeks, worse in the morning. Neurological examination normal.',
        screening: { ...before.form.screening, ...healthy, ...hints, ...screening },
        screeningConfirmed: true,
        ...form,
      },
    }, 'PUT')
  }

  return {
    visitor,
    async searchedIn(recordNumber) {
      return (await must(z.object({ source: z.string() }), await visitor.send('POST', '/api/patient-searches', { recordNumber }), 'searching')).source
    },
    begin,
    draft,
    view,
    send: async asking => await write('submission', await draft(asking), {}),
    query: (request, body) => write('query', request, { body }),
    answer: (request, body) => write('messages', request, { kind: 'answer', body, internal: false }),
    async approve(request, more = {}) {
      const { assessment } = await view(request)
      const best = assessment?.agents?.ranked.find(entry => entry.agent === assessment.agents?.best)
      const vein = assessment?.suggestion?.startsWith('iv-') === true
      const dose = z.looseObject({ doseMmolPerKg: z.number(), weightKg: z.number().optional() }).nullish().parse(best?.dose)
      const weight = z.object({ record: z.looseObject({ weight: z.object({ kg: z.number() }).nullish() }).nullish() }).parse(await view(request)).record?.weight?.kg ?? null
      return await write('approval', request, {
        contrast: assessment?.suggestion, agent: vein ? best?.agent ?? null : null, doseMmolPerKg: vein ? dose?.doseMmolPerKg ?? null : null, weightKg: vein ? weight : null,
        volumeMl: null, note: '', differsReason: null, wordGiven: false, waivedNeeds: [], ...more,
      })
    },
    decline: (request, reason, helpInstead = '') => write('decline', request, { reason, helpInstead }),
    async book(request, { scanner, startsAt, minutes = 40 }) {
      const scanners = await must(z.array(z.object({ id: z.string(), name: z.string() })), await visitor.get('/api/scanners'), 'reading the scanners')
      return await write('booking', request, { scannerId: scanners.find(found => found.name === scanner)?.id, startsAt, minutes }, 'PUT')
    },
    async give(request, more = {}) {
      const { decision } = await view(request)
      return await write('administration', request, {
        contrast: decision?.contrast, agent: decision?.agent ?? null, volumeMl: decision?.volumeMl ?? null, lot: '', givenAt: new Date(Date.now() - 60_000).toISOString(),
        differsCause: null, differsReason: '', reaction: 'none', reactionDetail: '', extravasation: false, ...more,
      })
    },
  }
}
