import { existsSync, mkdirSync, readdirSync, readFileSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { setTimeout as pause } from 'node:timers/promises'
import { fileURLToPath } from 'node:url'
import { builtProgram, type Ended, ended } from '../bin/builtProgram.ts'

/** Small and quick; invented. */
const SCENARIO = `title: a small hour or two
duration_h: 2
grid: { levels: 20 }
sizes: { classes: 12 }
`
/** 24 members with the size distributions of one time. */
const STUDY = `title: a small study
base: small.yaml
axes:
  - key: water.factor
    log: { from: 0.5, to: 2, count: 6 }
  - key: temperature.offset_K
    linear: { from: -2, to: 2, count: 4 }
keep: { scene_times_h: [1] }
`

const program = builtProgram()

export const MEMBERS = 24
export const FINAL_FILES = ['members.arrow', 'scenes.arrow', 'sensitivity.arrow']

export function writeStudy(place: string): void {
  mkdirSync(place, { recursive: true })
  writeFileSync(join(place, 'small.yaml'), SCENARIO)
  writeFileSync(join(place, 'study.yaml'), STUDY)
}

/** The compiled program on the study. */
export function sweep(place: string, ...words: string[]): Promise<Ended> {
  return ended(process.execPath, [program, 'sweep', 'study.yaml', ...words], place)
}

export function finalBytes(directory: string): Buffer[] {
  return FINAL_FILES.map((file) => readFileSync(join(directory, file)))
}

/** Lines in all files of members. */
export function linesIn(directory: string): number {
  const members = join(directory, 'members')
  if (!existsSync(members)) return 0
  const texts = readdirSync(members).map((file) => readFileSync(join(members, file), 'utf8'))
  return texts.join('').split('\n').length - 1
}

/** Sends a signal to a sweep once it has added so many lines, or so long after its start. */
export function sweepUntil(
  place: string,
  out: string,
  signal: NodeJS.Signals,
  when: { lines: number } | { milliseconds: number },
): Promise<Ended> {
  const before = linesIn(join(place, out))
  let isOver = false
  const words = [program, 'sweep', 'study.yaml', '-o', out, '--jobs', '2']
  const run = ended(process.execPath, words, place, async (kill) => {
    if ('milliseconds' in when) await pause(when.milliseconds)
    else while (!isOver && linesIn(join(place, out)) - before < when.lines) await pause(10)
    kill(signal)
  })
  return run.finally(() => {
    isOver = true
  })
}

/** A sweep whose files may grow to so many blocks of 1024 bytes: a stand-in for a full disk. */
export function sweepOnFullDisk(place: string, out: string, blocks: number): Promise<Ended> {
  const line = `ulimit -f ${blocks}; exec "${process.execPath}" "${program}" sweep study.yaml -o ${out}`
  return ended('bash', ['-c', line], place)
}

/** A sweep whose threads crash now and then. */
export function sweepWithCrashes(
  place: string,
  out: string,
  way: 'exit' | 'throw' | 'memory',
  chance: number,
): Promise<Ended> {
  const crashing = fileURLToPath(new URL('./sweepProgram.mjs', import.meta.url))
  const settings = [`MESOFROST_TEST_WAY=${way}`, `MESOFROST_TEST_CRASHES=${chance}`]
  // A small heap, so that a thread runs out of it soon.
  const words = [process.execPath, '--max-old-space-size=120', crashing]
  return ended('env', [...settings, ...words, 'sweep', 'study.yaml', '-o', out], place)
}
