import { describe, expect, it } from 'vitest'
import { createProgress } from '../../../scripts/lib/progress.mjs'

function terminal() {
  const lines: string[] = []
  const out = { isTTY: false, write: (text: string) => lines.push(text) }
  return { lines, progress: createProgress({ out: out as never, now: () => 0 }) }
}

describe('progress in a log', () => {
  it('writes remarks at once and one line when a step ends', async () => {
    const { lines, progress } = terminal()
    await progress.step('Packages', async (say: (text: string) => void) => {
      say('npm ci: about a minute')
      return 'installed'
    })
    expect(lines.map(line => line.trim())).toEqual(['Packages         npm ci: about a minute', 'Packages       ✓ installed (0.0 s)'])
  })

  it('says which step failed and lets the reason through', async () => {
    const { lines, progress } = terminal()
    await expect(progress.step('Build', () => Promise.reject(new Error('no')))).rejects.toThrow('no')
    expect(lines.join('')).toContain('Build          ✗ failed')
  })
})
