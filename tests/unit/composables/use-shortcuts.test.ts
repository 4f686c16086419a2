import { describe, expect, it } from 'vitest'
import { shortcutFor } from '~/composables/use-shortcuts'

const shortcuts = [
  { key: 'A', does: 'Approve', run: () => undefined },
  { key: 'J', does: 'Next', run: () => undefined },
  { key: '?', does: 'This list', run: () => undefined },
]
/** Anything that can be asked for its surroundings, as an element can. */
class Place extends EventTarget {
  constructor(readonly inside: string | null) { super() }
  closest(selector: string) { return this.inside !== null && selector.includes(this.inside) ? this : null }
}
function press(key: string, facts: { inside?: string, ctrlKey?: boolean, repeat?: boolean, isComposing?: boolean } = {}) {
  return shortcutFor({
    key, ctrlKey: facts.ctrlKey ?? false, metaKey: false, altKey: false, repeat: facts.repeat ?? false, isComposing: facts.isComposing ?? false,
    defaultPrevented: false, target: new Place(facts.inside ?? null),
  }, shortcuts)?.does ?? null
}

describe('single-key shortcuts', () => {
  it('fire with and without Shift', () => {
    expect([press('a'), press('A'), press('?')]).toEqual(['Approve', 'Approve', 'This list'])
  })

  it.each(['input', 'textarea', 'select', '[contenteditable]', '[role="dialog"]', '[role="menu"]'])('never fire inside %s', (inside) => {
    expect(press('a', { inside })).toBeNull()
  })

  it('leave key combinations and half-typed letters alone', () => {
    expect([press('a', { ctrlKey: true }), press('a', { isComposing: true })]).toEqual([null, null])
  })

  it('approve once however long the key is held, while moving through the list goes on', () => {
    expect([press('a', { repeat: true }), press('j', { repeat: true })]).toEqual([null, 'Next'])
  })
})
