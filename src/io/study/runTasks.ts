import type { StopSignal } from '../stopSignals.ts'
import type { MemberPool } from './memberPool.ts'
import type { StudyTask, TaskEnd } from './memberWork.ts'

export interface TaskRun<Item> {
  pool: MemberPool
  stop: { signal(): StopSignal | null }
  /** What the pool has to do for an item. */
  taskOf(item: Item): StudyTask
  /** Receives every end as it comes; what it throws ends the whole. */
  take(item: Item, end: TaskEnd): void
}

const STOP_CHECK_MS = 50

/** Resolves with the signal that comes, or with null once `dismiss` is called. */
function awaitStop(stop: { signal(): StopSignal | null }) {
  let dismiss = () => {}
  const come = new Promise<StopSignal | null>((resolve) => {
    const check = () => {
      const signal = stop.signal()
      if (signal !== null) resolve(signal)
    }
    const timer = setInterval(check, STOP_CHECK_MS)
    dismiss = () => {
      clearInterval(timer)
      resolve(null)
    }
  })
  return { come, dismiss: () => dismiss() }
}

/**
 * Works through the items in their order, as many at a time as the pool takes. Items are drawn only when their turn
 * comes, so that a long list costs no memory. Returns the signal that stopped it, if any; what was being worked on then
 * is abandoned and belongs to whoever closes the pool.
 */
export async function runTasks<Item>(
  items: Iterable<Item>,
  { pool, stop, taskOf, take }: TaskRun<Item>,
): Promise<StopSignal | null> {
  const rest = items[Symbol.iterator]()
  const watch = awaitStop(stop)
  let isOver = false
  const lane = async () => {
    while (!isOver) {
      const next = rest.next()
      if (next.done) return
      const end = await pool.run(taskOf(next.value))
      if (!isOver) take(next.value, end)
    }
  }
  // One more than the pool works on, so that no thread waits for its next task.
  const lanes = Promise.all(Array.from({ length: pool.jobs + 1 }, lane))
  try {
    return await Promise.race([watch.come, lanes.then(() => null)])
  } finally {
    isOver = true
    watch.dismiss()
    lanes.catch(() => {})
  }
}
