import { spawnSync } from 'node:child_process'
import { readFileSync } from 'node:fs'

/**
 * When a process began, as a text that is only ever compared: process numbers are used again, so a number alone does not say
 * that a recorded process still runs. Null when no such process runs (a finished one not yet collected counts as not running).
 *
 * @param {number} pid
 * @returns {string | null}
 */
export function beganAt(pid) {
  try {
    // Field 2 is the program's name in brackets and may hold anything; field 3 is the state, field 22 the start in clock ticks.
    const fields = readFileSync(`/proc/${pid}/stat`, 'utf8').replace(/^.*\) /s, '').split(' ')
    return fields[0] === 'Z' || fields[0] === 'X' ? null : (fields[19] ?? null)
  } catch {
    if (process.platform === 'linux') return null
    const { stdout, status } = spawnSync('ps', ['-o', 'lstart=', '-p', String(pid)], { encoding: 'utf8' })
    return status === 0 ? stdout.trim() : null
  }
}

/** True while exactly the recorded process runs. */
export function stillRuns({ pid, began }) {
  return began !== null && beganAt(pid) === began
}
