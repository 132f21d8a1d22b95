/**
 * Measures the speed of the model: one right-hand side, its ratio to the plain reference, and whole days. Every
 * measurement runs several times, each time in a process of its own; the least and the median are printed.
 */
import { fork } from 'node:child_process'
import { cpus } from 'node:os'
import { fileURLToPath } from 'node:url'
import { resolve } from '../src/model/scenario/resolve.ts'
import type { ScenarioInput } from '../src/model/scenario/schema.ts'
import { prepareColumn, type Snapshot, simulate } from '../src/model/simulate.ts'
import { makeReferenceTendency } from '../src/model/tendency/reference/referenceTendency.ts'
import { makeTendency, type Tendency } from '../src/model/tendency/tendency.ts'

const REPEATS = 5
const HOUR_S = 3600

const quiet: ScenarioInput = { grid: { levels: 120 }, sizes: { classes: 48 }, output_every_min: 60 }
const waves = [{ amplitude_K: 5, period_h: 1, vertical_wavelength_km: 10, at_km: 83 }]
const scenarios = { quiet, wave: { ...quiet, waves } }

type Day = keyof typeof scenarios

type Task =
  | { kind: 'calibration' }
  | { kind: 'day'; day: Day }
  | { kind: 'rhs'; day: Day; form: 'fast' | 'reference'; time_s: number; y: number[] }

interface Measured {
  /** ns per turn of the calibration loop, CPU s of a day, or us per right-hand side. */
  value: number
  evaluations?: number
  peakMemory_MB?: number
  last?: { time_s: number; y: number[] }
}

/** A chain of dependent multiplications and additions: what the processor gives, whatever the model. */
function chain(turns: number): number {
  let x = 1
  for (let turn = 0; turn < turns; turn++) x = x * 0.9999999 + 1e-7
  return x
}

function calibrate(): Measured {
  const turns = 2e7
  // The first call is left to the compiler.
  let x = chain(turns)
  const start = process.hrtime.bigint()
  x += chain(turns)
  const elapsed_ns = Number(process.hrtime.bigint() - start)
  if (!(x > 0)) throw new Error('the calibration loop ran away')
  return { value: elapsed_ns / turns }
}

/** CPU time of 24 h, model only: no files are written. */
function runDay(day: Day): Measured {
  const start = process.cpuUsage()
  const column = prepareColumn(resolve(scenarios[day]).scenario)
  const events = simulate(column)
  let snapshot: Snapshot | undefined
  let next = events.next()
  for (; !next.done; next = events.next()) {
    if (next.value.kind === 'state') snapshot = next.value.snapshot
  }
  const { user, system } = process.cpuUsage(start)
  return {
    value: (user + system) / 1e6,
    evaluations: next.value.evaluations,
    peakMemory_MB: process.resourceUsage().maxRSS / 1024,
    ...(snapshot && { last: { time_s: snapshot.time_s, y: Array.from(snapshot.y) } }),
  }
}

/** Shortest mean time over a few calls, out of many: what the machine needs when nothing disturbs it. */
function timeRightHandSide(task: Task & { kind: 'rhs' }): Measured {
  const { day, form, time_s, y } = task
  const column = prepareColumn(resolve(scenarios[day]).scenario)
  const tendency: Tendency = (form === 'fast' ? makeTendency : makeReferenceTendency)(column)
  tendency.enter(column.atmosphere.basis(0), { from_s: time_s - HOUR_S, to_s: time_s })
  const dy = new Array<number>(y.length).fill(0)
  const [batches, calls] = form === 'fast' ? [1000, 20] : [100, 2]
  let shortest_us = Number.POSITIVE_INFINITY
  for (let batch = 0; batch < batches; batch++) {
    const start = process.hrtime.bigint()
    for (let call = 0; call < calls; call++) {
      // Under waves every call gets an instant of its own: nothing is remembered from the one before.
      tendency.evaluate(time_s - HOUR_S + ((batch * calls + call) % HOUR_S), y, dy)
    }
    const elapsed_us = Number(process.hrtime.bigint() - start) / 1000
    shortest_us = Math.min(shortest_us, elapsed_us / calls)
  }
  return { value: shortest_us }
}

function perform(task: Task): Measured {
  if (task.kind === 'calibration') return calibrate()
  return task.kind === 'day' ? runDay(task.day) : timeRightHandSide(task)
}

function inOwnProcess(task: Task): Promise<Measured> {
  return new Promise((resolveMeasured, reject) => {
    const child = fork(fileURLToPath(import.meta.url), { env: { ...process.env, BENCH_TASK: '1' } })
    child.once('message', (measured) => resolveMeasured(measured as Measured))
    child.once('error', reject)
    child.once('exit', (code) => reject(new Error(`a measurement ended early with code ${code}`)))
    child.send(task)
  })
}

/** The repeated measurement, least value first. */
async function repeat(task: Task): Promise<Measured[]> {
  const all: Measured[] = []
  for (let turn = 0; turn < REPEATS; turn++) all.push(await inOwnProcess(task))
  return all.sort((a, b) => a.value - b.value)
}

async function report(label: string, task: Task, unit: string, digits: number): Promise<Measured> {
  const all = await repeat(task)
  const [least, median] = [all[0], all[REPEATS >> 1]]
  const more = [
    least.evaluations === undefined ? '' : `, ${least.evaluations} right-hand sides`,
    least.peakMemory_MB === undefined ? '' : `, peak memory ${least.peakMemory_MB.toFixed(0)} MB`,
  ]
  const values = `${least.value.toFixed(digits)} (median ${median.value.toFixed(digits)}) ${unit}`
  console.log(`${label.padEnd(34)}${values}${more.join('')}`)
  return least
}

async function main(): Promise<void> {
  console.log(`${cpus()[0].model}, Node ${process.version}, 120 levels x 48 classes`)
  await report('calibration loop', { kind: 'calibration' }, 'ns per turn', 2)
  const speeds: Record<string, number> = {}
  for (const day of ['quiet', 'wave'] as const) {
    const { last } = await report(`24 h, ${day}`, { kind: 'day', day }, 'CPU s', 2)
    if (!last) throw new Error('a day without a state')
    for (const form of ['fast', 'reference'] as const) {
      const task = { kind: 'rhs', day, form, ...last } as const
      const { value } = await report(`right-hand side, ${day}, ${form}`, task, 'us', 1)
      speeds[form] = value
    }
    const ratio = speeds.reference / speeds.fast
    console.log(`${`reference over fast, ${day}`.padEnd(34)}${ratio.toFixed(1)}`)
  }
}

if (process.env.BENCH_TASK) {
  process.once('message', (task: Task) => {
    process.send?.(perform(task), () => process.disconnect())
  })
} else {
  await main()
}
