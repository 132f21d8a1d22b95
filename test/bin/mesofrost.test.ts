import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { setTimeout as pause } from 'node:timers/promises'
import { afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { builtProgram, ended } from './builtProgram.ts'

/** Small and quick; invented. */
const SCENARIO = `title: a small night
duration_h: 1
grid: { levels: 20 }
sizes: { classes: 12 }
`

let program: string
let place: string
beforeAll(() => {
  program = builtProgram()
})
beforeEach(() => {
  place = mkdtempSync(join(tmpdir(), 'mesofrost program-'))
  writeFileSync(join(place, 'small.yaml'), SCENARIO)
})
afterEach(() => rmSync(place, { recursive: true }))

function mesofrost(...words: string[]) {
  return ended(process.execPath, [program, ...words], place)
}

/** A line of a shell, with $mesofrost for the program. */
function shell(line: string) {
  const script = `mesofrost() { "${process.execPath}" "${program}" "$@"; }\n${line}`
  return ended('bash', ['-c', script], place)
}

const ARROW_FILES = [
  'brightness.arrow',
  'budget.arrow',
  'profiles.arrow',
  'size-distribution.arrow',
  'state.arrow',
]

describe('mesofrost run', () => {
  it('says on stdout how it went, where the output is and what to do next', async () => {
    const { code, stdout, stderr } = await mesofrost('run', 'small.yaml')
    expect(code, stderr).toBe(0)
    expect(stdout).toMatch(/^a small night\n/)
    expect(stdout).toMatch(/\nThe output is in runs\/small-001; look at it with: .* --at 1h\n$/)
    expect(stderr).toMatch(/^mesofrost: working in runs\/\.small\.partial-[0-9a-f]{8}\n/)
    expect(readdirSync(join(place, 'runs', 'small-001'))).toEqual(
      [...ARROW_FILES, 'run.json'].sort(),
    )
  })

  it('repeats a run byte for byte from its run.json', async () => {
    await mesofrost('run', 'small.yaml', '--set', 'temperature.offset_K=-1', '-o', 'first')
    const again = await mesofrost('run', 'first/run.json', '-o', 'second', '-j')
    expect(JSON.parse(again.stdout).status).toBe('finished')
    for (const file of ARROW_FILES) {
      const [first, second] = ['first', 'second'].map((run) => readFileSync(join(place, run, file)))
      expect(second.equals(first), file).toBe(true)
    }
  })

  it.each([
    ['SIGINT', 130],
    ['SIGTERM', 143],
  ] as const)(
    'on %s closes its files, names the partial directory and exits %d',
    async (signal, code) => {
      const words = ['run', 'small.yaml', '--set', 'duration_h=5000', '-o', 'long']
      const stopped = await ended(process.execPath, [program, ...words], place, async (kill) => {
        while (!readdirSync(place).some((name) => name.startsWith('.long.partial-')))
          await pause(20)
        await pause(200)
        kill(signal)
      })
      expect(stopped.code, stopped.stderr).toBe(code)
      const partial = readdirSync(place).filter((name) => name !== 'small.yaml')
      expect(partial).toHaveLength(1)
      expect(stopped.stderr).toContain(
        `stopped by ${signal}; what was computed until then is in ${partial[0]}`,
      )
      const shown = await mesofrost('show', partial[0], '--at', '0h')
      expect(shown.code, shown.stderr).toBe(0)
    },
  )

  it('leaves nothing under the final name when the disk is full', async () => {
    // A limit of 64 blocks of 1024 bytes on every file stands in for a full disk.
    const full = await shell(
      'ulimit -f 64; mesofrost run small.yaml --set output_every_min=1 -o full',
    )
    expect(full.code, full.stderr).toBe(1)
    expect(full.stderr).toContain('the disk is full or the file grows too large')
    const left = readdirSync(place).filter((name) => name !== 'small.yaml')
    expect(left).toHaveLength(1)
    expect(full.stderr).toContain(`what was computed until then is in ${left[0]}`)
    expect(left[0]).toMatch(/^\.full\.partial-/)
  })

  it('reports bad input in a line with exit code 2 and writes nothing', async () => {
    const { code, stdout, stderr } = await mesofrost(
      'run',
      'small.yaml',
      '--set',
      'grid.levels=1e7',
    )
    expect([code, stdout]).toEqual([2, ''])
    expect(stderr).toMatch(/^mesofrost: .*grid\.levels/)
    expect(readdirSync(place)).toEqual(['small.yaml'])
  })
})

describe('a closed pipe', () => {
  it('is no error', async () => {
    const { stdout, stderr, code } = await shell('mesofrost schema | head -c 1; exit $PIPESTATUS')
    expect({ stdout, stderr, code }).toEqual({ stdout: '{', stderr: '', code: 0 })
  })
})
