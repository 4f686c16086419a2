import { readFileSync } from 'node:fs'
import { fileURLToPath } from 'node:url'
import { describe, expect, it } from 'vitest'
import { z } from 'zod'
import { checkFile, Unreadable } from './rows/report'

const content = (name: string) => readFileSync(fileURLToPath(new URL(`tables/${name}`, import.meta.url)), 'utf8')
const text = (report: { lines: string[] }) => report.lines.join('\n')

describe('checking a table', () => {
  it('goes by the beginning of the file name, and tells published rows from computed ones', () => {
    const report = checkFile('egfr_child-ours.csv', content('egfr_child.csv'))
    expect(report.failed).toBe(0)
    expect(report.lines[0]).toMatch(/published 11 of 11, computed 24 of 24 passed/)
  })

  it('prints a row that falls short with what was expected and what came out', () => {
    const report = checkFile('ckd_stage.csv', content('ckd_stage.csv').replace('st-002,90,G1', 'st-002,90,G2'))
    expect(report).toMatchObject({ passed: 19, failed: 1 })
    expect(text(report)).toMatch(/st-002, record 3 \(computed\)\n {4}stage: expected G2, actual G1/)
  })

  it('counts a row that cannot be read as failed', () => {
    const report = checkFile('egfr_ckdepi2021.csv', content('egfr_ckdepi2021.csv').replace('ck-002,50,male', 'ck-002,50,mole'))
    expect(report.failed).toBe(1)
    expect(text(report)).toContain('sex cannot be read: mole')
  })

  it('does without notes and kinds of row, and with blank lines', () => {
    const report = checkFile('ckd_stage-short.csv', 'id,egfr,expected_stage,expected_below_30,expected_display,stage_if_rounded_first\na,29.6,G4,true,29.6,G3b\n\n')
    expect(report).toMatchObject({ passed: 1, failed: 0 })
  })

  it.each([
    ['notes.csv', 'a,b\n1,2\n', 'is no known table'],
    ['ckd_stage.csv', 'id,egfr\na,30\n', 'has no column expected_stage'],
    ['ckd_stage.csv', 'id,egfr\na\n', '1 cells, 2 expected'],
    ['ckd_stage.csv', 'id,egfr\n', 'holds nothing to check'],
    ['cases.json', '{', 'is not JSON'],
    ['cases.json', '{}', 'is not a list of cases'],
  ])('refuses %s holding %j', (name, body, why) => {
    expect(() => checkFile(name, body)).toThrow(Unreadable)
    expect(() => checkFile(name, body)).toThrow(why)
  })
})

describe('checking cases', () => {
  const [first] = z.array(z.looseObject({})).parse(JSON.parse(content('vignettes.json')))
  const check = (changes: object) => checkFile('cases.json', JSON.stringify([{ ...first, ...changes }]))

  it('lists findings and needs beside the expected safety without scoring them', () => {
    const report = checkFile('vignettes.json', content('vignettes.json'))
    expect(report).toMatchObject({ passed: 4, failed: 0 })
    expect(text(report)).toMatch(/expected safety: Do not compute a meaningful eGFR[^]*finding: hold, dialysis-hemodialysis/)
  })

  it('fails a case with another contrast', () => {
    const report = check({ expectedContrast: 'iv-with-only' })
    expect(report.failed).toBe(1)
    expect(text(report)).toMatch(/v01: FAILED\n {4}contrast: expected iv-with-only, actual none/)
  })

  it('fails a case of a question that is not there, and one that cannot be read', () => {
    expect(text(check({ questionId: 'gone' }))).toMatch(/expected none, actual question not found/)
    expect(text(check({ age: 'old' }))).toMatch(/case 1: FAILED, it cannot be read\n {4}age: /)
  })

  it('takes a case without sex, history or context', () => {
    expect(check({ sex: null, history: null, context: null }).failed).toBe(0)
  })

  it('lists what is not understood', () => {
    expect(text(check({ context: { kidney: 'blue', shoe: 44 } }))).toMatch(/not understood: shoe: 44\n.*not understood: kidney: blue/)
  })
})
