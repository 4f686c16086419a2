import { spawn } from 'node:child_process'
import { closeSync, mkdirSync, openSync, readFileSync } from 'node:fs'
import { get } from 'node:http'
import { join } from 'node:path'
import { setTimeout as sleep } from 'node:timers/promises'
import { Failure, Stopped } from './failure.mjs'
import { beganAt } from './identity.mjs'

const slug = (name) => name.toLowerCase().replace(/[^a-z0-9]+/g, '-')

/**
 * Starts and ends the programs of one run. Each is the leader of a process group of its own: Ctrl-C then reaches the script
 * alone, which ends them in the right order, and ending a program ends what it started too.
 *
 * @param {{ cwd: string, logs: string, onChange?: (running: { name: string, pid: number, began: string | null }[]) => void }} options
 *   `logs` is the folder that receives one log for each program; `onChange` hears what runs whenever that changes
 */
export function createProcesses({ cwd, logs, onChange = () => {} }) {
  mkdirSync(logs, { recursive: true })
  /** @type {Set<Program>} */
  const programs = new Set()
  let closing = false

  const running = () => [...programs].map(({ name, child, began }) => ({ name, pid: child.pid, began }))

  function open(name, command, args, { env = process.env, show = false } = {}) {
    if (closing) throw new Stopped('Stopped.')
    const log = join(logs, `${slug(name)}.log`)
    const file = show ? null : openSync(log, 'w', 0o600)
    const child = spawn(command, args, {
      cwd,
      env,
      detached: true,
      stdio: show ? ['ignore', 'inherit', 'inherit'] : ['ignore', file, file],
    })
    if (file !== null) closeSync(file)
    const program = { name, child, log: show ? null : log, began: child.pid ? beganAt(child.pid) : null, ended: null, result: null, wanted: false }
    program.ended = new Promise((resolve) => {
      const end = (result) => {
        program.result = result
        programs.delete(program)
        onChange(running())
        resolve(result)
      }
      child.once('error', (error) => end({ code: 127, signal: null, error }))
      child.once('exit', (code, signal) => end({ code, signal, error: null }))
    })
    programs.add(program)
    onChange(running())
    return program
  }

  /**
   * Runs a program to its end.
   *
   * @returns {Promise<{ ok: boolean, code: number | null, log: string | null, output: string }>}
   */
  async function run(name, command, args, options) {
    const program = open(name, command, args, options)
    const { code, error } = await program.ended
    if (closing) throw new Stopped('Stopped.')
    if (error) return { ok: false, code: 127, log: program.log, output: `${command}: ${error.message}` }
    return { ok: code === 0, code, log: program.log, output: program.log ? readFileSync(program.log, 'utf8') : '' }
  }

  /** Like `run`, but a program that fails throws a Failure with the end of what it printed. */
  async function must(name, command, args, options) {
    const result = await run(name, command, args, options)
    if (!result.ok) throw new Failure(describe(name, result))
    return result
  }

  /**
   * Starts a program that keeps running, and waits until `url` answers.
   *
   * @param {string} name
   * @param {string} command
   * @param {string[]} args
   * @param {{ url: string, timeout?: number, env?: NodeJS.ProcessEnv, show?: boolean, onCrash?: (message: string) => void }} options
   */
  async function serve(name, command, args, { url, timeout = 60_000, onCrash = () => {}, ...options }) {
    const program = open(name, command, args, options)
    const until = performance.now() + timeout
    while (program.result === null && performance.now() < until) {
      if ((await answers(url)) && program.result === null) {
        void program.ended.then((result) => {
          if (!program.wanted && !closing) onCrash(describe(name, { ...result, log: program.log, output: textOf(program.log) }))
        })
        return program
      }
      await Promise.race([sleep(100), program.ended])
    }
    if (closing) throw new Stopped('Stopped.')
    const result = program.result
    await stop(program)
    const output = textOf(program.log)
    if (result) throw new Failure(describe(name, { code: result.code, log: program.log, output: result.error?.message ?? output }))
    throw new Failure(`The ${name} did not answer at ${url} within ${timeout / 1000} s.\n${tail(output)}`)
  }

  /** Ends one program: SIGTERM to its group, SIGKILL when it has not ended after `grace` milliseconds. */
  async function stop(program, { grace = 10_000, signal = 'SIGTERM' } = {}) {
    program.wanted = true
    signalGroup(program.child.pid, signal)
    const ended = await Promise.race([program.ended.then(() => true), sleep(grace, false, { ref: false })])
    // Also after a clean end: a program that the leader left behind must not outlive it.
    signalGroup(program.child.pid, 'SIGKILL')
    if (!ended) await program.ended
    return ended
  }

  /** Ends everything that still runs, the latest started first, and refuses to start more. */
  async function stopAll(options) {
    closing = true
    const clean = []
    for (const program of [...programs].reverse()) clean.push(await stop(program, options))
    return clean.every(Boolean)
  }


  return { run, must, serve, stop, stopAll }
}

/** @typedef {{ name: string, child: import('node:child_process').ChildProcess, log: string | null, began: string | null, ended: Promise<unknown>, result: unknown, wanted: boolean }} Program */

/** Sends a signal to a process group; a group that has ended already is no error. */
export function signalGroup(pid, signal) {
  if (!pid) return
  try {
    process.kill(-pid, signal)
  } catch (error) {
    if (error.code !== 'ESRCH') throw error
  }
}

/** The last lines of a text, indented for a report. */
export function tail(text, lines = 25) {
  return text.trimEnd().split('\n').slice(-lines).map((line) => `    ${line}`).join('\n')
}

/** What to show of a failed program: from its first error on, else the end. */
export function excerpt(text, lines = 25) {
  const all = text.trimEnd().split('\n')
  const first = all.findIndex((line) => /\bERROR\b|\b[A-Za-z]*Error: |\bnpm error\b/.test(line))
  return tail(first === -1 ? text : all.slice(first, first + lines).join('\n'), lines)
}

const textOf = (log) => (log ? readFileSync(log, 'utf8') : '')

function describe(name, { code, signal, log, output }) {
  const how = signal ? `was ended by ${signal}` : `ended with code ${code}`
  const where = log ? `\n  Whole log: ${log}` : ''
  return `The ${name} ${how}.\n${excerpt(output ?? '')}${where}`
}

/** True when the address answers with anything but a server error. */
export function answers(url) {
  return new Promise((resolve) => {
    const request = get(url, { timeout: 10_000 }, (response) => {
      response.resume()
      resolve((response.statusCode ?? 500) < 500)
    })
    request.once('timeout', () => request.destroy())
    request.once('error', () => resolve(false))
  })
}
