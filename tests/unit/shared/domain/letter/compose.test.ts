import { describe, expect, it } from 'vitest'
import { composeLetter, composeNeutral } from '#shared/domain/letter/compose'
import { starterPolicy } from '#shared/domain/policy/defaults'
import { quietScreening } from '../safety/situation'
import { creatinine } from '../assessment/request-inputs'
import { bodyOf, common, gadobutrol, slot } from './letter-inputs'

const usual = { contrast: 'iv-with-and-without', agent: gadobutrol, differsCause: null, reaction: false, extravasation: false } as const

describe('the letter before the scan', () => {
  const letter = composeLetter({ kind: 'before', slot, ...common('iv-with-and-without') })

  it('says what, why, when and where in the department\'s time', () => {
    expect(letter).toMatchObject({ title: 'Your brain scan will use contrast, and here is why', mark: 'iv-with-and-without', from: 'Northshore Imaging', to: 'Marta Lindqvist' })
    expect(letter.opening.join(' ')).toMatch(/infection or a growth/)
    expect(bodyOf(letter)).toContain('Your scan is on Wednesday, December 2 at 10:20 am.')
    expect(bodyOf(letter)).toContain('Scanner 2, ground floor')
  })

  it('follows the clauses: why, what must be in place, what to tell us', () => {
    expect(letter.sections.map(section => section.id)).toEqual(['appointment', 'before', 'bring', 'about-contrast', 'tell-us', 'call'])
  })

  it('asks only what this exam needs, and spares the blood test that is at hand', () => {
    expect(bodyOf(letter)).toContain('Your blood test from November 12 gives no reason to leave contrast out.')
    expect(bodyOf(letter)).not.toMatch(/Have a blood test|may be pregnant/)
    const missing = composeLetter({ kind: 'before', slot, ...common('iv-with-and-without', { readings: [] }) })
    expect(bodyOf(missing)).toContain('Have a blood test to check your kidneys.')
  })

  it('asks about pregnancy where it may be', () => {
    const young = composeLetter({
      kind: 'before', slot,
      ...common('iv-with-and-without', { patient: { birthDate: '1992-05-20', sex: 'female', weightKg: 60, weightAt: null, heightCm: null, heightAt: null }, screening: { ...quietScreening, pregnancy: 'no' } }),
    })
    expect(young.sections.find(section => section.id === 'tell-us')?.items).toContain('You may be pregnant.')
  })

  it('tells a patient without contrast that nothing is injected', () => {
    const without = composeLetter({ kind: 'before', slot, ...common('none', { answers: { tumorInfection: 'no' } }) })
    expect(without.title).toBe('Your brain scan does not need contrast, and here is why')
    expect(bodyOf(without)).toMatch(/You get no injection/)
    expect(without.sections.some(section => section.id === 'about-contrast')).toBe(false)
  })

  it('explains the doctor\'s choice and not the suggestion where they differ', () => {
    const differs = composeLetter({ kind: 'before', slot, ...common('none') })
    expect(differs.title).toBe('Your brain scan will be done without contrast, and here is why')
    expect(differs.opening).toEqual(['A doctor looked at your case. They chose to do the scan without contrast.'])
  })

  it('tells what happens in a joint and with a liver agent', () => {
    const joint = composeLetter({ kind: 'before', slot, ...common('intra-articular', {}, 'shoulder') })
    expect(joint.title).toBe('Your shoulder scan will use contrast in the joint, and here is why')
    expect(bodyOf(joint)).toMatch(/thin needle/)
    expect(bodyOf(joint)).not.toMatch(/tube in a vein/)
    const liver = composeLetter({ kind: 'before', slot, ...common('iv-hepatobiliary', {}, 'liver'), decision: { contrast: 'iv-hepatobiliary', agent: { name: 'gadoxetate', macrocyclic: false } } })
    expect(bodyOf(liver)).toMatch(/about 20 minutes later/)
    expect(bodyOf(liver)).not.toMatch(/most tightly/)
  })

  it('says that a doctor agreed where kidney function held contrast', () => {
    const low = composeLetter({ kind: 'before', slot, ...common('iv-with-and-without', { readings: [creatinine(2.4, '2026-11-30T14:00:00Z')] }) })
    expect(bodyOf(low)).toContain('They agreed that you can have contrast.')
    expect(bodyOf(low)).toContain('With very weak kidneys, a rare skin illness has been seen')
    expect(bodyOf(letter)).not.toMatch(/skin illness/)
    const inpatient = composeLetter({ kind: 'before', slot, ...common('iv-with-and-without', { setting: 'inpatient', readings: [creatinine(0.94, '2026-12-01T00:00:00Z')] }) })
    expect(bodyOf(inpatient)).toContain('They agreed that you can have contrast.')
  })

  it('tells a pregnant patient that contrast was agreed on, and does not ask whether she may be pregnant', () => {
    const patient = { birthDate: '1992-05-20', sex: 'female' as const, weightKg: 60, weightAt: null, heightCm: null, heightAt: null }
    const pregnant = composeLetter({ kind: 'before', slot, ...common('iv-with-and-without', { patient, screening: { ...quietScreening, pregnancy: 'yes' } }) })
    expect(pregnant.opening).toContain('You are pregnant. Your doctors agreed that contrast is needed.')
    expect(bodyOf(pregnant)).not.toContain('You may be pregnant.')
    const possible = composeLetter({ kind: 'before', slot, ...common('iv-with-and-without', { patient, screening: { ...quietScreening, pregnancy: 'possible' } }) })
    expect(bodyOf(possible)).toContain('You may be pregnant.')
    expect(bodyOf(possible)).not.toContain('You are pregnant.')
  })

  it('neither asks for nor rules out a blood test under one year of age', () => {
    const baby = { birthDate: '2026-06-01', sex: 'male' as const, weightKg: 7, weightAt: null, heightCm: 65, heightAt: null }
    expect(bodyOf(composeLetter({ kind: 'before', slot, ...common('iv-with-and-without', { patient: baby, readings: [] }) }))).not.toMatch(/blood test/)
  })

  it('tells a patient whose dialysis is not known no less than one with weak kidneys', () => {
    const open = composeLetter({ kind: 'before', slot, ...common('iv-with-and-without', { screening: { ...quietScreening, dialysis: 'unknown' } }) })
    expect(bodyOf(open)).toContain('With very weak kidneys, a rare skin illness has been seen')
    expect(bodyOf(open)).not.toContain('gives no reason to leave contrast out')
  })

  it('goes to a parent or guardian for a child', () => {
    const child = composeLetter({ kind: 'before', slot, ...common('none', { patient: { birthDate: '2018-05-20', sex: 'male', weightKg: 25, weightAt: null, heightCm: 130, heightAt: null } }) })
    expect(child.to).toBe('the parent or guardian of Marta Lindqvist')
    expect(child.opening.at(-1)).toBe('In this letter, “you” means your child.')
  })

  it('carries names as text, whatever they hold', () => {
    const name = '<img src=x onerror=alert(1)> & "Co"\u202E'
    const part = common('none')
    const hostile = composeLetter({ kind: 'before', slot: { ...slot, place: name }, ...part, patient: { ...part.patient, fullName: name } })
    expect(hostile.to).toBe(name)
    expect(hostile.sections.find(section => section.id === 'appointment')?.paragraphs).toContain(name)
    expect([hostile.neutralSubject, hostile.detailedSubject].join()).not.toContain('img')
  })
})

describe('the letter after the scan', () => {
  it('names the agent, what to expect and the warning signs', () => {
    const letter = composeLetter({ kind: 'after', given: usual, ...common('iv-with-and-without') })
    expect(letter.title).toBe('Contrast was used in your brain scan, and here is why')
    expect(bodyOf(letter)).toContain('Its name is gadobutrol.')
    expect(bodyOf(letter)).toMatch(/call 911 at once/)
    expect(bodyOf(letter)).toMatch(/skin gets hard or tight/)
  })

  it('promises no quick way out of the body to weak kidneys or on dialysis', () => {
    const after = (inputs: Parameters<typeof common>[1]) => bodyOf(composeLetter({ kind: 'after', given: usual, ...common('iv-with-and-without', inputs) }))
    expect(after({})).toMatch(/in the urine within a day/)
    expect(after({ readings: [creatinine(2.4, '2026-11-30T14:00:00Z')] })).toMatch(/this takes a few days/)
    const open = after({ screening: { ...quietScreening, dialysis: 'unknown' } })
    expect(open).toMatch(/this takes a few days/)
    expect(open).not.toMatch(/within a day/)
    const dialysis = after({ screening: { ...quietScreening, dialysis: 'hemodialysis' } })
    expect(dialysis).toMatch(/Your dialysis helps to clear the contrast/)
    expect(dialysis).not.toMatch(/urine|within a day/)
  })

  it('says so where none was used, with no warning about contrast', () => {
    const letter = composeLetter({ kind: 'after', given: { ...usual, contrast: 'none', agent: null }, ...common('none', { answers: { tumorInfection: 'no' } }) })
    expect(letter).toMatchObject({ title: 'No contrast was used in your brain scan', mark: 'none' })
    expect(letter.sections.map(section => section.id)).not.toContain('warning-signs')
  })

  it('gives the reason in plain words where it differed from the plan', () => {
    const letter = composeLetter({ kind: 'after', given: { ...usual, contrast: 'none', agent: null, differsCause: 'iv-failed' }, ...common('iv-with-and-without') })
    expect(letter.opening).toEqual(['The scan was done in another way than planned.'])
    expect(bodyOf(letter)).toContain('We could not place the small tube in a vein.')
  })

  it('tells of a reaction and of fluid under the skin', () => {
    const letter = composeLetter({ kind: 'after', given: { ...usual, reaction: true, extravasation: true }, ...common('iv-with-and-without') })
    expect(bodyOf(letter)).toMatch(/You had a reaction.*\n.*under the skin/)
  })

  it('tells a breastfeeding mother that she can go on', () => {
    const letter = composeLetter({ kind: 'after', given: usual, ...common('iv-with-and-without', { screening: { ...quietScreening, breastfeeding: 'yes' } }) })
    expect(bodyOf(letter)).toContain('You can keep on breastfeeding.')
  })
})

describe('the letter about a changed plan', () => {
  it('gives the new time', () => {
    const letter = composeLetter({ kind: 'changed', change: 'moved', slot, ...common('iv-with-and-without') })
    expect(letter).toMatchObject({ kind: 'changed', title: 'Your brain scan has a new time', mark: 'iv-with-and-without' })
    expect(bodyOf(letter)).toContain('Wednesday, December 2 at 10:20 am')
  })

  it('gives the new plan', () => {
    const letter = composeLetter({ kind: 'changed', change: 'replanned', slot, ...common('none') })
    expect(letter.title).toBe('The plan for your brain scan has changed')
    expect(bodyOf(letter)).toMatch(/without contrast/)
  })

  it('calls an exam off without a mark or an appointment', () => {
    const letter = composeLetter({ kind: 'changed', change: 'called-off', ...common('iv-with-and-without') })
    expect(letter.mark).toBeNull()
    expect(bodyOf(letter)).toMatch(/Please do not come at the time we gave you/)
    expect(letter.sections.map(section => section.id)).toEqual(['changed', 'call'])
  })
})

describe('the neutral message', () => {
  it('names no exam, contrast, reason or person', () => {
    const { subject, paragraphs } = composeNeutral(starterPolicy)
    expect(`${subject} ${paragraphs.join(' ')}`).not.toMatch(/scan|contrast|MRI|brain|Marta|kidney/i)
    expect(paragraphs.join(' ')).toMatch(/date of birth/)
    expect(composeLetter({ kind: 'before', slot, ...common('none') }).neutralSubject).toBe(subject)
  })
})
