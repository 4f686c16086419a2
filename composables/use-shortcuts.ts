import type { MaybeRefOrGetter } from 'vue'
import { onBeforeUnmount, onMounted, toValue } from 'vue'

/** A single key that does something on this screen. */
export interface Shortcut {
  /** As on the key cap: `A`, `?`, `Escape`. Letters fire with or without Shift. */
  key: string
  /** What it does, for the list under `?`. */
  does: string
  run: () => void
}

type Pressed = Pick<KeyboardEvent, 'key' | 'ctrlKey' | 'metaKey' | 'altKey' | 'repeat' | 'isComposing' | 'defaultPrevented' | 'target'>

/** Inside these a key belongs to the control, never to the screen. */
const ownKeys = 'input, textarea, select, [contenteditable], [role="dialog"], [role="alertdialog"], [role="listbox"], [role="combobox"], [role="menu"], [role="tablist"]'

/** The shortcut that a key press means, or null: never inside a field or an open dialog, never with Ctrl, Alt or the command key. */
export function shortcutFor(event: Pressed, shortcuts: readonly Shortcut[]): Shortcut | null {
  if (event.ctrlKey || event.metaKey || event.altKey || event.isComposing || event.defaultPrevented) return null
  const target = event.target
  if (target !== null && 'closest' in target && typeof target.closest === 'function' && target.closest(ownKeys) !== null) return null
  const pressed = event.key.length === 1 ? event.key.toUpperCase() : event.key
  const found = shortcuts.find(shortcut => (shortcut.key.length === 1 ? shortcut.key.toUpperCase() : shortcut.key) === pressed)
  // A held key moves through a list but never decides twice.
  return found && event.repeat && !['J', 'K'].includes(found.key) ? null : found ?? null
}

/** Listens for the screen's single-key shortcuts while it is open and while the person has them turned on. */
export function useShortcuts(shortcuts: readonly Shortcut[], enabled: MaybeRefOrGetter<boolean>): void {
  function onKey(event: KeyboardEvent) {
    if (!toValue(enabled) || document.querySelector('[role="dialog"], [role="alertdialog"]') !== null) return
    const found = shortcutFor(event, shortcuts)
    if (!found) return
    event.preventDefault()
    found.run()
  }
  onMounted(() => window.addEventListener('keydown', onKey))
  onBeforeUnmount(() => window.removeEventListener('keydown', onKey))
}
