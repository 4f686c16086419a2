import { Failure } from './failure.mjs'

/** The parts of `npm test`, in the order they run. */
export const stages = ['lint', 'typecheck', 'unit', 'integration', 'e2e']

/**
 * Reads the command line of `npm test`: `--only` once or often, its names separated by commas or not; anything else is a file
 * filter that is handed to the test runners.
 *
 * @param {string[]} argv
 * @returns {{ only: string[], filters: string[] }}
 * @throws {Failure} an unknown part, or `--only` without one
 */
export function parseTestArguments(argv) {
  const wanted = new Set()
  const filters = []
  for (let index = 0; index < argv.length; index += 1) {
    const argument = argv[index]
    const inline = /^--only=(.*)$/.exec(argument)
    if (argument !== '--only' && !inline) {
      if (argument.startsWith('-')) throw new Failure(`Unknown option ${argument}. Usage: npm test -- [--only ${stages.join('|')}] [file filter]`)
      filters.push(argument)
      continue
    }
    if (!inline) index += 1
    const names = (inline ? inline[1] : (argv[index] ?? '')).split(',').filter((name) => name !== '')
    if (names.length === 0) throw new Failure(`--only needs one of: ${stages.join(', ')}`)
    for (const name of names) {
      if (!stages.includes(name)) throw new Failure(`There is no part ${name}. Parts: ${stages.join(', ')}`)
      wanted.add(name)
    }
  }
  return { only: wanted.size === 0 ? stages : stages.filter((name) => wanted.has(name)), filters }
}
