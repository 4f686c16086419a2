import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import type { ApiResult } from '~/composables/use-api'
import { createAutosave, saveDelayMs } from '~/composables/use-autosave'

const ok: ApiResult<unknown> = { ok: true, data: null, version: 2 }

function refused(status: number): ApiResult<unknown> {
  return { ok: false, problem: { status, code: 'x', title: 'x', detail: 'x', errors: [], extra: {} } }
}

beforeEach(() => void vi.useFakeTimers())
afterEach(() => void vi.useRealTimers())

describe('saving while somebody types', () => {
  it('waits for a pause, then saves once', async () => {
    const write = vi.fn(async () => ok)
    const save = createAutosave(write)
    save.touch()
    save.touch()
    expect(save.state.value).toBe('waiting')
    await vi.advanceTimersByTimeAsync(saveDelayMs)
    expect(write).toHaveBeenCalledTimes(1)
    expect(save.state.value).toBe('saved')
    expect(save.dirty.value).toBe(false)
  })

  it('saves what was typed during a write with the next one, never two at a time', async () => {
    const finish: (() => void)[] = []
    const write = vi.fn(() => new Promise<ApiResult<unknown>>((resolve) => {
      finish.push(() => resolve(ok))
    }))
    const save = createAutosave(write)
    save.touch()
    await vi.advanceTimersByTimeAsync(saveDelayMs)
    save.touch()
    await vi.advanceTimersByTimeAsync(saveDelayMs * 3)
    expect(write).toHaveBeenCalledTimes(1)
    finish[0]?.()
    await vi.advanceTimersByTimeAsync(0)
    expect(save.dirty.value).toBe(true)
    await vi.advanceTimersByTimeAsync(saveDelayMs)
    expect(write).toHaveBeenCalledTimes(2)
    finish[1]?.()
    await vi.advanceTimersByTimeAsync(0)
    expect(save.state.value).toBe('saved')
  })

  it('tries again by itself after a lost connection and keeps the input as unsaved until then', async () => {
    const write = vi.fn<() => Promise<ApiResult<unknown>>>().mockResolvedValueOnce(refused(0)).mockResolvedValue(ok)
    const save = createAutosave(write)
    save.touch()
    await vi.advanceTimersByTimeAsync(saveDelayMs)
    expect(save.state.value).toBe('failed')
    expect(save.dirty.value).toBe(true)
    await vi.advanceTimersByTimeAsync(60_000)
    expect(save.state.value).toBe('saved')
  })

  it('stops at a conflict until a person decides', async () => {
    const write = vi.fn(async () => refused(412))
    const save = createAutosave(write)
    save.touch()
    await vi.advanceTimersByTimeAsync(saveDelayMs)
    save.touch()
    await vi.advanceTimersByTimeAsync(600_000)
    expect(write).toHaveBeenCalledTimes(1)
    expect(save.state.value).toBe('conflict')
    expect(await save.flush()).toBe(false)
  })

  it('saves at once before leaving, and says whether nothing is left', async () => {
    const write = vi.fn(async () => ok)
    const save = createAutosave(write)
    expect(await save.flush()).toBe(true)
    expect(write).not.toHaveBeenCalled()
    save.touch()
    expect(await save.flush()).toBe(true)
    expect(write).toHaveBeenCalledTimes(1)
  })

  it('forgets a write that belongs to a draft closed meanwhile', async () => {
    let finish = () => {}
    const save = createAutosave(() => new Promise((resolve) => {
      finish = () => resolve(refused(412))
    }))
    save.touch()
    await vi.advanceTimersByTimeAsync(saveDelayMs)
    save.reset()
    finish()
    await vi.advanceTimersByTimeAsync(0)
    expect(save.state.value).toBe('idle')
  })
})
