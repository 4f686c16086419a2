#!/usr/bin/env node
/**
 * How long one assessment takes, over every starter question: `node scripts/bench/assess.mjs`. Milliseconds depend on the machine
 * and on what else runs, so each time is also given as a multiple of a fixed piece of work done beside it: sorting 1,000 numbers.
 */
import { join } from 'node:path'
import { loadSources } from '../lib/load-sources.mjs'
import { root } from '../lib/paths.mjs'

/** Few for the worst inputs, which take long. */
const rounds = { typical: 25, worst: 3 }

const sources = await loadSources()
try {
  const load = (path) => sources.load(join(root, 'shared', 'domain', path))
  const { assess } = await load('assessment/assess.ts')
  const { starterAgents } = await load('contrast/agents.ts')
  const { starterQuestions } = await load('guidance/questions/index.ts')
  const { starterPolicy } = await load('policy/defaults.ts')
  const { emptyScreening } = await load('safety/screening.ts')
  const rules = { guidance: { version: 'starter', questions: starterQuestions }, policy: starterPolicy, agents: starterAgents }

  const cases = {
    typical: starterQuestions.map((question) => typical(question, emptyScreening)),
    worst: starterQuestions.map((question) => worst(question, emptyScreening)),
  }
  for (const inputs of [...cases.typical, ...cases.typical, ...cases.worst]) assess(inputs, rules)

  console.log(`${starterQuestions.length} questions; ratio to sorting 1,000 numbers`)
  for (const [name, list] of Object.entries(cases)) {
    // The baseline is measured between the assessments, so that a busy machine slows both alike.
    const baseline = []
    const times = list.map((inputs) => {
      const own = []
      for (let round = 0; round < rounds[name]; round += 1) {
        baseline.push(timed(sortNumbers))
        own.push(timed(() => assess(inputs, rules)))
      }
      return { id: inputs.questionId, ms: median(own) }
    })
    const unit = median(baseline)
    const slowest = times.reduce((a, b) => (b.ms > a.ms ? b : a))
    const show = (ms) => `${ms.toFixed(3)} ms, ${(ms / unit).toFixed(1)} times`
    console.log(`${name}: median ${show(median(times.map(({ ms }) => ms)))}; worst ${show(slowest.ms)} (${slowest.id}); baseline ${unit.toFixed(3)} ms`)
  }
} finally {
  await sources.close()
}

function timed(work) {
  const since = performance.now()
  work()
  return performance.now() - since
}

function median(values) {
  const sorted = [...values].sort((a, b) => a - b)
  return sorted[Math.floor(sorted.length / 2)]
}

/** Always the same 1,000 numbers. */
function sortNumbers() {
  let state = 1
  const numbers = Array.from({ length: 1000 }, () => (state = (state * 48_271) % 2_147_483_647))
  numbers.sort((a, b) => a - b)
}

function creatinine(index, value, collectedAt) {
  return {
    id: `creatinine-${index}`, analyte: 'creatinine', source: 'record', sourceLabel: 'Laboratory', value, comparator: null, unit: 'mg/dL',
    collectedAt, collectedText: collectedAt, precision: 'instant', issuedAt: collectedAt, status: 'final', refusal: null,
  }
}

/** An outpatient of 61 with every question answered, three creatinines and one earlier dose. */
function typical(question, emptyScreening) {
  const usual = question.branches[question.usualBranch]?.when ?? {}
  const values = (decider) => (decider.kind === 'yesno' ? ['yes', 'no'] : decider.options.map((option) => option.id))
  return {
    now: '2026-12-01T20:32:00Z', plannedAt: '2026-12-08T15:00:00Z', questionId: question.id, priority: 'routine', setting: 'outpatient',
    answers: Object.fromEntries(question.deciders.map((decider) => [decider.id, usual[decider.id]?.[0] ?? values(decider)[0]])),
    patient: { birthDate: '1965-03-04', sex: 'female', weightKg: 74, weightAt: null, heightCm: null, heightAt: null },
    readings: [creatinine(1, 0.94, '2026-11-12T14:00:00Z'), creatinine(2, 0.9, '2026-05-12T14:00:00Z'), creatinine(3, 0.92, '2025-11-12T14:00:00Z')],
    record: { state: 'complete', readAt: '2026-12-01T20:30:00Z' },
    screening: {
      ...emptyScreening, kidneyDisease: 'no', kidneyRiskFactor: 'no', dialysis: 'none', acuteIllness: 'no', liverDisease: 'no', earlierReaction: 'no', asthma: 'no',
      pregnancy: 'not-applicable', breastfeeding: 'not-applicable', nephrogenicSystemicFibrosis: 'no', implants: 'no',
    },
    exposures: [dose(1, '2025-11-13T15:00:00Z')],
  }
}

function dose(index, givenAt) {
  return { id: `dose-${index}`, agent: 'gadobutrol', agentText: 'gadobutrol', givenAt, amountMmol: 7.4, source: 'record' }
}

/** Everything open or not known, a series of 200 creatinines and 40 earlier doses. */
function worst(question, emptyScreening) {
  const hoursAgo = (hours) => new Date(Date.parse('2026-12-01T20:00:00Z') - hours * 3_600_000).toISOString()
  const typicalCase = typical(question, emptyScreening)
  return {
    ...typicalCase,
    answers: Object.fromEntries(question.deciders.map((decider) => [decider.id, 'unknown'])),
    patient: { ...typicalCase.patient, birthDate: '1988', sex: 'unknown', weightKg: null },
    readings: Array.from({ length: 200 }, (_, index) => creatinine(index, 1.4 + (index % 7) / 10, hoursAgo(6 + index * 12))),
    screening: {
      ...emptyScreening, kidneyDisease: 'unknown', kidneyRiskFactor: 'unknown', dialysis: 'unknown', acuteIllness: 'unknown', liverDisease: 'unknown',
      earlierReaction: 'unknown', asthma: 'unknown', pregnancy: 'unknown', breastfeeding: 'unknown', nephrogenicSystemicFibrosis: 'unknown', implants: 'unknown',
      specialNeeds: ['interpreter', 'sedation', 'cannot-consent'],
    },
    exposures: Array.from({ length: 40 }, (_, index) => dose(index, hoursAgo(10 + index * 700))),
  }
}
