import { workMember as work, workRun } from '../../dist/bin/memberWorker.js'

const chance = Number(process.env.MESOFROST_TEST_CRASHES ?? 0)

/** Takes memory until the thread may have no more. */
function exhaust() {
  for (const held = []; ; ) held.push(new Array(1e5).fill(held.length))
}

export { workRun }

export function workMember(task) {
  if (Math.random() >= chance) return work(task)
  const way = process.env.MESOFROST_TEST_WAY
  if (way === 'memory') return exhaust()
  if (way === 'exit') return process.exit(9)
  throw new Error('a slip of the program')
}
