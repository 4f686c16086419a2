import { describe, expect, it } from 'vitest'
import { z } from 'zod'
import { vignetteSchema } from './rows/vignette'
import { scoreVignette } from './rows/vignette-score'
import table from './tables/vignettes.json'

const cases = z.array(vignetteSchema).parse(table)

/** What a case expects of safety is prose: `npm run check:medicine` prints it beside what was found, for a person to compare. */
describe('a case answered by the starter guidance', () => {
  it.each(cases.map(vignette => [`${vignette.id}: ${vignette.history ?? ''}`.slice(0, 90), vignette] as const))('agrees with %s', (_title, vignette) => {
    const { shortfalls, beside } = scoreVignette(vignette)
    expect(shortfalls).toEqual([])
    expect(beside.filter(line => line.startsWith('not understood'))).toEqual([])
  })
})
