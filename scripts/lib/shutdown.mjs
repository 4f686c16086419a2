/**
 * Runs `work` until it ends or a signal comes, and then `close`, exactly once. Under `npm` a Ctrl-C arrives twice, from the
 * terminal and again from npm: what comes within two seconds of the first is the same wish. A later one means "now".
 *
 * @param {{ work: (stopped: Promise<string>) => Promise<number>, close: (options: { hurry: AbortSignal, settled: Promise<void> }) => Promise<void>, say: (text: string) => void, report: (error: unknown) => void }} options
 *   `work` gets a promise of the signal's name and returns the exit code. `close` gets `settled`, which resolves when the work has
 *   let go of everything: interrupted work still ends the call it is in.
 * @returns {Promise<number>} the exit code
 */
export async function untilSignal({ work, close, say, report, clock = () => performance.now() }) {
  const hurry = new AbortController()
  let first = null
  let tell = () => {}
  const stopped = new Promise((resolve) => (tell = resolve))
  const onSignal = (signal) => {
    if (first === null) {
      first = clock()
      tell(signal)
    } else if (clock() - first > 2000) {
      hurry.abort()
    }
  }
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, onSignal)
  const parent = watchParent(() => onSignal('SIGTERM'))
  // A closed terminal must not keep the database running.
  for (const stream of [process.stdout, process.stderr]) stream.on('error', () => {})
  let code = 0
  const working = work(stopped)
  const interrupted = stopped.then((signal) => ({ signal }))
  try {
    const end = await Promise.race([working.then((value) => ({ value })), interrupted])
    if ('signal' in end) {
      say(`\n${end.signal === 'SIGINT' ? 'Ctrl-C' : end.signal}: stopping.`)
      code = 0
    } else {
      code = end.value
    }
  } catch (error) {
    report(error)
    code = 1
  }
  const nothing = () => {} // Interrupted work fails as its programs are ended under it.
  try {
    await close({ hurry: hurry.signal, settled: working.then(nothing, nothing) })
  } catch (error) {
    report(error)
    code = 1
  }
  clearInterval(parent)
  return code
}

/**
 * npm runs a script through a shell and passes a SIGTERM to that shell alone, which dies without a word to us. Under npm the end
 * of our parent is therefore the same wish.
 */
function watchParent(onEnd) {
  if (!process.env.npm_lifecycle_event) return undefined
  const parent = process.ppid
  return setInterval(() => {
    if (process.ppid !== parent) onEnd()
  }, 250).unref()
}
