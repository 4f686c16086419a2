import { execFile } from 'node:child_process'
import { fileURLToPath } from 'node:url'
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest'
import { z } from 'zod'
import { ehrRead } from '#server/ehr/ehr-read'
import { startFhirFake, type FhirFake } from '../../support/fhir-fake'

const root = fileURLToPath(new URL('../../..', import.meta.url))

const printed = z.looseObject({
  answer: z.string(),
  complete: z.boolean(),
  used: z.looseObject({ observationId: z.string(), mgPerDl: z.number(), comparator: z.string().nullable(), collectedAt: z.string() }).nullable(),
  egfr: z.looseObject({ display: z.string(), equation: z.string(), bound: z.string(), ageYears: z.number() }).nullable(),
  creatinine: z.array(z.looseObject({ observationId: z.string(), value: z.number().nullable(), unit: z.string().nullable(), used: z.boolean(), passedOver: z.string().nullable() })),
  flags: z.array(z.looseObject({ id: z.string(), text: z.string() })),
  candidates: z.array(z.looseObject({ ehrId: z.string() })),
  patient: z.looseObject({ displayName: z.string() }).nullable(),
})

interface Run { code: number, stdout: string, stderr: string }

/** Runs the command as an operator does, without a build. */
function run(args: string[], env: Record<string, string>): Promise<Run> {
  return new Promise((resolve) => {
    execFile(process.execPath, ['scripts/ehr-read.mjs', ...args], { cwd: root, env: { PATH: process.env.PATH, TZ: 'UTC', ...env } }, (error, stdout, stderr) => {
      resolve({ code: typeof error?.code === 'number' ? error.code : 0, stdout, stderr })
    })
  })
}

let fake: FhirFake
beforeAll(async () => {
  fake = await startFhirFake()
})
afterEach(() => fake.reset())
afterAll(() => fake.stop())

/** The same without a process of its own, for what does not depend on one. */
async function read(args: string[], env = fake.env) {
  const { exitCode, report, words } = await ehrRead([...args, '--zone', 'America/Chicago'], env, new Date())
  return { code: exitCode, stderr: words, report: printed.parse(report) }
}

describe('the command in a process of its own', () => {
  it('prints JSON alone on standard output, words on standard error, and exits 0', async () => {
    const { code, stdout, stderr } = await run(['40-2217'], fake.env)
    expect(code).toBe(0)
    expect(printed.parse(JSON.parse(stdout))).toMatchObject({ answer: 'complete', used: { mgPerDl: 0.94 }, egfr: { display: '69' } })
    expect(stderr).toContain('eGFR 69')
  })

  it('is right with small pages, an ignored order and relative links', async () => {
    await fake.control({ quirks: { smallPages: 4, ignoreSort: true, relativeNext: true, noTotal: true } })
    const { code, stdout } = await run(['Patient/beatrice-lang', '--since', '2020-01-01'], fake.env)
    expect(code).toBe(0)
    expect(printed.parse(JSON.parse(stdout))).toMatchObject({ used: { observationId: 'beatrice-lang-corrected', mgPerDl: 1.31 } })
  })

  it('exits 2 for a wrong call, 3 for nobody, 4 for an outage', async () => {
    expect(await run([], fake.env)).toMatchObject({ code: 2, stdout: '' })
    expect((await run(['99-0000'], fake.env)).code).toBe(3)
    await fake.control({ fault: 'html200' })
    const outage = await run(['40-2217'], fake.env)
    expect(outage.code).toBe(4)
    expect(printed.parse(JSON.parse(outage.stdout))).toMatchObject({ answer: 'unreachable', complete: false })
  })
})

describe('what ehr:read answers', () => {
  it('prints the creatinine used, its time in UTC, the eGFR with equation and age, and exits 0', async () => {
    const { code, report } = await read(['40-2217'])
    expect(code).toBe(0)
    expect(report).toMatchObject({
      answer: 'complete', complete: true, patient: { displayName: 'Marta Lindqvist', recordNumber: '40-2217' },
      used: { observationId: 'marta-lindqvist-obs-3', mgPerDl: 0.94, comparator: null, collectedAt: expect.stringMatching(/T13:00:00\.000Z$/), ageDays: 19 },
      egfr: { display: '69', equation: 'ckd-epi-2021-cr', bound: 'exact', ageYears: 61 },
    })
    expect(report.creatinine.filter(({ used }) => used)).toHaveLength(1)
    expect(report.creatinine.filter(({ used, passedOver }) => !used && !passedOver)).toEqual([])
  })

  it('takes Patient/id too', async () => {
    expect((await read(['Patient/marta-lindqvist'])).report.used?.mgPerDl).toBe(0.94)
  })

  it('keeps the sign of a value below the measuring range, and calls the eGFR a bound', async () => {
    const { report } = await read(['40-2517'])
    expect(report).toMatchObject({ used: { comparator: '<' }, egfr: { bound: 'at-least' } })
  })

  it('names the reason for every value it passed over', async () => {
    const { report } = await read(['40-2385'])
    const reasons = Object.fromEntries(report.creatinine.map(({ observationId, passedOver }) => [observationId.replace('owen-pritchard-', ''), passedOver]))
    expect(report.used?.observationId).toBe('owen-pritchard-usable')
    expect(reasons).toMatchObject({
      'urine-specimen': 'Not from blood: Urine specimen',
      'urine-inside': 'Not from blood: Urine',
      'urine-code': expect.stringContaining('urine'),
      'cancelled': expect.stringMatching(/cancelled/i),
      'mistake': expect.stringMatching(/entered in error/i),
      'preliminary': expect.stringMatching(/not final/i),
      'future': expect.stringMatching(/future/i),
      'masked': expect.stringContaining('does not show it'),
      'local-code': expect.stringContaining('KREA-POC'),
    })
  })

  it('gives no eGFR on dialysis', async () => {
    expect((await read(['40-2231'])).report).toMatchObject({ status: 'dialysis', egfr: null, used: { mgPerDl: 7.9 } })
  })

  it('is right with small pages, an ignored order, relative links and a repeated row at once', async () => {
    const { report: plain } = await read(['40-2539'])
    await fake.control({ quirks: { smallPages: 4, ignoreSort: true, relativeNext: true, repeatRows: true, noTotal: true } })
    const { code, report } = await read(['40-2539'])
    expect(code).toBe(0)
    expect(report.used).toEqual(plain.used)
    expect(report.egfr).toEqual(plain.egfr)
    expect(report.creatinine.map(({ observationId }) => observationId)).toEqual(plain.creatinine.map(({ observationId }) => observationId))
  })

  it.each([
    ['a loop of links', { quirks: { loopNext: true, smallPages: 9 } }],
    ['a link to another server', { quirks: { foreignNext: true, smallPages: 9 } }],
    ['a row of another patient', { quirks: { rowOfAnotherPatient: true } }],
    ['a failing second page', { fault: '500', pattern: '_page=', quirks: { smallPages: 9 } }],
  ])('says incomplete and exits 4 with %s', async (_, fault) => {
    await fake.control(fault)
    const { code, report, stderr } = await read(['Patient/beatrice-lang'])
    expect({ code, answer: report.answer, complete: report.complete }).toEqual({ code: 4, answer: 'incomplete', complete: false })
    expect(report.creatinine.length).toBeGreaterThan(0)
    expect(stderr).toContain('laboratory:')
  })

  it.each([
    ['401', { fault: '401' }], ['a web page', { fault: 'html200' }], ['cut JSON', { fault: 'truncatedJson' }], ['no connection', { fault: 'unreachable' }],
  ])('exits 4 with %s and still prints JSON', async (_, fault) => {
    await fake.control(fault)
    const { code, report } = await read(['Patient/marta-lindqvist'])
    expect({ code, answer: report.answer, used: report.used }).toEqual({ code: 4, answer: 'unreachable', used: null })
  })

  it('waits as a busy server asks, then answers in full', async () => {
    await fake.control({ fault: 'retryAfterSeconds', seconds: 1, count: 2 })
    expect((await read(['40-2217'])).code).toBe(0)
  })

  it('gives up on a server that hangs', async () => {
    await fake.control({ fault: 'hang' })
    expect((await read(['40-2217'])).code).toBe(4)
  })

  it('exits 3 for nobody and for several, who are listed', async () => {
    expect(await read(['99-0000'])).toMatchObject({ code: 3, report: { answer: 'not-found' } })
    expect(await read(['Patient/nobody'])).toMatchObject({ code: 3, report: { answer: 'not-found' } })
    const several = await read(['39-1180'])
    expect(several).toMatchObject({ code: 3, report: { answer: 'ambiguous', used: null } })
    expect(several.report.candidates.map(({ ehrId }) => ehrId).sort()).toEqual(['peter-novak', 'peter-novak-old'])
  })

  it.each([
    [[]], [['40-2217', 'more']], [['40-2217', '--since', 'yesterday']], [['40-2217', '--since', '2026-02-31']], [['40-2217', '--zone', 'Mars/Base']], [['--nonsense']],
  ])('exits 2 with the usage for %j', async (args) => {
    const { exitCode, report, words } = await ehrRead(args, fake.env, new Date())
    expect({ exitCode, report }).toEqual({ exitCode: 2, report: null })
    expect(words).toContain('Usage: npm run ehr:read')
  })

  it('exits 2 where no record is configured or the settings cannot work', async () => {
    expect(await ehrRead(['40-2217'], {}, new Date())).toMatchObject({ exitCode: 2, report: null })
    expect(await ehrRead(['40-2217'], { ...fake.env, NUXT_EHR_AUTH: 'password' }, new Date())).toMatchObject({ exitCode: 2, report: null })
  })

  it('signs in by Backend Services', async () => {
    const guarded = await startFhirFake({ auth: 'backend-services' })
    const { code, report } = await read(['40-2217'], guarded.env)
    await guarded.stop()
    expect({ code, mgPerDl: report.used?.mgPerDl }).toEqual({ code: 0, mgPerDl: 0.94 })
  })
})
