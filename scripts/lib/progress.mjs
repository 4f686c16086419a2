import { Stopped } from './failure.mjs'

/**
 * Step-by-step progress on the terminal. On a terminal a running step counts its seconds in place; elsewhere (a log, a pipe) a
 * step is one line when it begins to matter and one when it ends.
 */
export function createProgress({ out = process.stdout, now = () => performance.now(), every = 1000 } = {}) {
  const live = out.isTTY === true
  const seconds = (since) => `${((now() - since) / 1000).toFixed(1)} s`
  const write = (text) => out.write(text)
  const clear = () => live && write('\r\u001B[K')
  let current = null

  const line = (text = '') => {
    clear()
    write(`${text}\n`)
    if (current && live) write(current.shown())
  }

  /**
   * Runs one step and prints how it ended. `work` gets `say`, for remarks in between, and returns the few words that end the line.
   *
   * @template T
   * @param {string} name
   * @param {(say: (text: string) => void) => Promise<T>} work
   * @returns {Promise<T>}
   */
  async function step(name, work) {
    const since = now()
    const label = name.padEnd(14)
    current = { shown: () => `  ${label} … ${Math.floor((now() - since) / 1000)} s` }
    if (live) write(current.shown())
    let quiet = 0
    const timer = setInterval(() => {
      quiet += every
      if (live) {
        clear()
        write(current.shown())
      } else if (quiet % 15_000 === 0) {
        write(`${current.shown()}\n`)
      }
    }, every)
    try {
      const result = await work((text) => line(`  ${label}   ${text}`))
      current = null
      line(`  ${label} ✓ ${typeof result === 'string' ? result : (result?.note ?? 'done')} (${seconds(since)})`)
      return result
    } catch (error) {
      current = null
      line(`  ${label} ✗ ${error instanceof Stopped ? 'stopped' : 'failed'} (${seconds(since)})`)
      throw error
    } finally {
      clearInterval(timer)
    }
  }

  return { step, line }
}
