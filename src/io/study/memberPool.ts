import { setFlagsFromString } from 'node:v8'
import type { StudyTask, TaskEnd } from './memberWork.ts'

/** Something that works on tasks, several at a time. */
export interface MemberPool {
  /** How many it works on at a time. */
  jobs: number
  /** Never rejects: a thread that is gone is an end like any other. */
  run(task: StudyTask): Promise<TaskEnd>
  /** Ends at once; what is still being worked on is lost. */
  close(): Promise<void>
}

/**
 * Left to itself, the heap of a thread grows for minutes on what one run leaves behind. Such small nurseries cost no
 * time in a trial, still smaller ones did.
 */
const NURSERY_MB = 8
/** How far a heap may outgrow what it holds, per cent, before it is cleared. */
const HEAP_GROWTH_PERCENT = 50

/**
 * A pool of worker threads.
 *
 * @param workerPath the compiled file that exports `workMember` and `workRun`
 */
export async function openThreadPool(workerPath: string, jobs: number): Promise<MemberPool> {
  const { Piscina } = await import('piscina')
  setFlagsFromString(`--heap-growing-percent=${HEAP_GROWTH_PERCENT}`)
  const pool = new Piscina({
    filename: workerPath,
    minThreads: jobs,
    maxThreads: jobs,
    resourceLimits: { maxYoungGenerationSizeMb: NURSERY_MB },
    recordTiming: false,
    workerHistogram: false,
  })
  // A thread that dies between two tasks is replaced by the pool.
  pool.on('error', () => {})
  return {
    jobs,
    run: async (task) => {
      try {
        return (await pool.run(task, { name: task.work })) as TaskEnd
      } catch (error) {
        return { kind: 'crashed', reason: error instanceof Error ? error.message : String(error) }
      }
    },
    close: () => pool.destroy(),
  }
}
