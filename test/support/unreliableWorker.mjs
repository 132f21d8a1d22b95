/** A worker thread that does what the title of its scenario says, to see what the pool makes of it. */
import { writeFileSync } from 'node:fs'

export function workMember({ document }) {
  const [act, argument] = document.title.split(' ')
  if (act === 'exit') process.exit(7)
  if (act === 'throw') throw new Error('a slip of the program')
  if (act === 'uncaught') {
    setImmediate(() => {
      throw new Error('a slip outside')
    })
    return new Promise(() => {})
  }
  if (act === 'touch') writeFileSync(argument, '')
  return { kind: 'finished', outcome: { status: 'failed', reason: act } }
}
