import { fileURLToPath } from 'node:url'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { type MemberPool, openThreadPool } from '../../../src/io/study/memberPool.ts'
import type { MemberTask } from '../../../src/io/study/memberWork.ts'

const WORKER = fileURLToPath(new URL('../../support/unreliableWorker.mjs', import.meta.url))

let pool: MemberPool
beforeAll(async () => {
  pool = await openThreadPool(WORKER, 2)
})
afterAll(() => pool.close())

function task(title: string): MemberTask {
  return {
    work: 'workMember',
    document: { title } as MemberTask['document'],
    keep: { sceneTimes_h: [] },
  }
}

describe('a pool of threads', () => {
  it('returns what a thread returns', async () => {
    expect(await pool.run(task('well'))).toEqual({
      kind: 'finished',
      outcome: { status: 'failed', reason: 'well' },
    })
  })

  it.each(['exit', 'throw', 'uncaught'])(
    'returns a thread that ends by %s as a crash and goes on with another',
    async (act) => {
      const ends = await Promise.all([task(act), task('well'), task(act)].map(pool.run))
      expect(ends.map(({ kind }) => kind)).toEqual(['crashed', 'finished', 'crashed'])
      expect(await pool.run(task('still well'))).toMatchObject({ kind: 'finished' })
    },
  )
})
