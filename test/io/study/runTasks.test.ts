import { describe, expect, it } from 'vitest'
import type { StopSignal } from '../../../src/io/stopSignals.ts'
import type { MemberPool } from '../../../src/io/study/memberPool.ts'
import type { StudyTask, TaskEnd } from '../../../src/io/study/memberWork.ts'
import { runTasks } from '../../../src/io/study/runTasks.ts'

const END: TaskEnd = { kind: 'crashed', reason: 'a stand-in' }
const TASK = { work: 'workMember' } as StudyTask

/** A pool that ends a task when told to. */
function handPool(jobs: number) {
  const waiting: ((end: TaskEnd) => void)[] = []
  const pool: MemberPool = {
    jobs,
    run: () => new Promise((resolve) => waiting.push(resolve)),
    close: async () => {},
  }
  return { pool, waiting, endNext: () => waiting.shift()?.(END) }
}

const neverStopped = { signal: () => null }

function nextTurn(): Promise<void> {
  return new Promise((resolve) => setImmediate(resolve))
}

describe('runTasks', () => {
  it('works through all items and hands each end over with its item', async () => {
    const taken: [number, TaskEnd][] = []
    const pool: MemberPool = {
      jobs: 3,
      run: async () => {
        await nextTurn()
        return END
      },
      close: async () => {},
    }
    const items = Array.from({ length: 20 }, (_, i) => i)
    const signal = await runTasks(items, {
      pool,
      stop: neverStopped,
      taskOf: () => TASK,
      take: (item, end) => taken.push([item, end]),
    })
    expect(signal).toBeNull()
    expect(taken.map(([item]) => item).sort((a, b) => a - b)).toEqual(items)
    expect(taken.every(([, end]) => end === END)).toBe(true)
  })

  it('draws an item only when its turn comes', async () => {
    const { pool, endNext } = handPool(2)
    let drawn = 0
    const items = (function* () {
      for (; drawn < 6; ) yield drawn++
    })()
    const done = runTasks(items, { pool, stop: neverStopped, taskOf: () => TASK, take: () => {} })
    await nextTurn()
    // Two being worked on and one waiting; the generator counts when it goes on.
    expect(drawn).toBeLessThanOrEqual(3)
    for (let i = 0; i < 6; i++) {
      endNext()
      await nextTurn()
    }
    expect(await done).toBeNull()
    expect(drawn).toBe(6)
  })

  it('stops with the signal and takes nothing that ends later', async () => {
    const { pool, waiting } = handPool(2)
    let signal: StopSignal | null = null
    const taken: number[] = []
    const done = runTasks([0, 1, 2, 3], {
      pool,
      stop: { signal: () => signal },
      taskOf: () => TASK,
      take: (item) => taken.push(item),
    })
    await nextTurn()
    signal = 'SIGINT'
    expect(await done).toBe('SIGINT')
    for (const end of waiting) end(END)
    await nextTurn()
    expect(taken).toEqual([])
  })

  it('ends with the error of whoever takes the results, and starts no more', async () => {
    let started = 0
    const pool: MemberPool = {
      jobs: 1,
      run: async () => {
        started++
        await nextTurn()
        return END
      },
      close: async () => {},
    }
    const done = runTasks(Array(50).fill(0), {
      pool,
      stop: neverStopped,
      taskOf: () => TASK,
      take: () => {
        throw new Error('no space left')
      },
    })
    await expect(done).rejects.toThrow('no space left')
    await nextTurn()
    await nextTurn()
    expect(started).toBeLessThan(5)
  })
})
