import { Writable } from 'node:stream'
import { describe, expect, it } from 'vitest'
import { reportOutcome } from '../../src/io/reportOutcome.ts'
import { ModelError } from '../../src/model/errors.ts'

async function reported(error: unknown): Promise<{ code: number; text: string }> {
  let text = ''
  const stderr = new Writable({
    write(chunk, _encoding, done) {
      text += chunk
      done()
    },
  })
  const terminal = { stdout: stderr, stderr, workingDirectory: '/home/me', calledAs: 'mesofrost' }
  const outcome = { status: 'failed', directory: '/home/me/.a b.partial-1', error } as const
  const code = await reportOutcome(outcome, { json: false, quiet: false, told: [] }, terminal)
  return { code, text }
}

describe('reportOutcome', () => {
  it('tells of a failed model the time, the altitude, the quantity, what to try, and where the rest is', async () => {
    const place = { time_s: 11_520, altitude_m: 84_100, quantity: 'ice of class 3' }
    const { code, text } = await reported(new ModelError('ice of class 3 became NaN', place))
    expect(code).toBe(1)
    expect(text).toContain('failed at 3.2 h, 84.1 km, in ice of class 3: ice of class 3 became NaN')
    expect(text).toContain('Try tighter tolerances (--set numerics.relative_tolerance=1e-4)')
    expect(text).toContain('mesofrost check --at 3.2h')
    expect(text).toContain("what was computed until then is in '.a b.partial-1'\n")
  })

  it('leaves out what is not known of the place', async () => {
    const place = { time_s: 3600, altitude_m: null, quantity: null }
    const { text } = await reported(new ModelError('out of steps', place))
    expect(text).toContain('the run failed at 1 h: out of steps.')
  })

  it('knows a full disk', async () => {
    const full = Object.assign(new Error('ENOSPC: no space left'), { code: 'ENOSPC' })
    expect((await reported(full)).text).toContain('Make room, write elsewhere with --out')
  })

  it('reports anything else by its message', async () => {
    expect((await reported(new TypeError('x is not a function'))).text).toContain(
      'the run failed: x is not a function\n',
    )
  })
})
