import type { ColumnModel } from '../../src/io/columnModel.ts'
import { silentProgress } from '../../src/io/runProgress.ts'
import type { RunRequest } from '../../src/io/runScenario.ts'
import type { LoadedScenario } from '../../src/io/scenario/loadScenario.ts'
import type { Variable } from '../../src/model/diagnostics/variables.ts'
import type { Scenario } from '../../src/model/scenario/types.ts'
import type { SimulationEvent, Snapshot } from '../../src/model/simulate.ts'
import type { Column } from '../../src/model/state/column.ts'

/** Numbers per column state; the stand-in has two levels of two classes. */
const LEVELS = 2
const CLASSES = 2
const STATE_LENGTH = 3

function variable(name: string, type: 'number' | 'text' = 'number'): Variable {
  return { name, longName: name.replaceAll('_', ' '), unit: '1', standardName: null, type }
}

interface StandInChanges {
  /** Called before every output after the first, with its time; may throw or wait. */
  beforeOutput?(time_s: number): void
  /** Levels of the made-up profiles, to make the output large. */
  levels?: number
}

/** A model that needs no physics: the state is the exact number of seconds that have passed. */
export function standInModel({ beforeOutput, levels = LEVELS }: StandInChanges = {}): ColumnModel {
  return {
    prepareColumn: (scenario) =>
      ({
        scenario,
        sizes: { radii_m: Float64Array.of(1e-9, 5e-8) },
        layout: { length: STATE_LENGTH },
        atmosphere: { breakPoints_s: [1800] },
      }) as unknown as Column,
    *simulate(
      { scenario },
      from,
    ): Generator<
      SimulationEvent,
      { evaluations: number; acceptedSteps: number; largestStep_s: number }
    > {
      let snapshot: Snapshot = from ?? {
        time_s: 0,
        y: new Float64Array(STATE_LENGTH),
        stepSize_s: 1,
        basisTime_s: 0,
      }
      yield { kind: 'state', snapshot }
      while (snapshot.time_s < scenario.duration_s) {
        const time_s = snapshot.time_s + scenario.outputInterval_s
        yield { kind: 'step', time_s, y: [...snapshot.y] }
        beforeOutput?.(time_s)
        snapshot = {
          ...snapshot,
          time_s,
          y: snapshot.y.map((value) => value + scenario.outputInterval_s),
        }
        yield { kind: 'state', snapshot }
      }
      return { evaluations: 7, acceptedSteps: 3, largestStep_s: 600 }
    },
    diagnose(_column, { time_s, y }) {
      const time_h = time_s / 3600
      return {
        time_s,
        profiles: {
          time_h: new Float64Array(levels).fill(time_h),
          altitude_km: Float64Array.from({ length: levels }, (_, i) => 80 + i),
          seconds: new Float64Array(levels).fill(y[0]),
        },
        numberPerClass: new Float64Array(levels * CLASSES).fill(y[0]),
        brightness: {
          time_h: [time_h, time_h],
          channel: ['uv', 'lidar'],
          peak: [Number.NaN, y[0]],
        },
        budget: { time_h, residual: 0 },
      }
    },
    summarise: () => {
      let outputs = 0
      return {
        add() {
          outputs++
        },
        result: () => ({ numbers: { outputs, nothing: null }, warnings: [] }),
      }
    },
    profileVariables: () => ['time_h', 'altitude_km', 'seconds'].map((name) => variable(name)),
    sizeVariables: () =>
      ['time_h', 'altitude_km', 'number_per_class_per_m3'].map((name) => variable(name)),
    brightnessVariables: () => [variable('time_h'), variable('channel', 'text'), variable('peak')],
    budgetVariables: () => [variable('time_h'), variable('residual')],
    stateLayoutDescription: () => ({ seconds: STATE_LENGTH }),
    backgroundTable: () => {
      throw new Error('no air in a stand-in')
    },
  }
}

/** Six hours with an output every ten minutes and a state every two hours. */
export function standInScenario(changes: Partial<Scenario> = {}): LoadedScenario {
  const scenario = {
    title: 'a stand-in',
    duration_s: 6 * 3600,
    outputInterval_s: 600,
    startUtc: null,
    grid: { levels: LEVELS },
    sizes: { classes: CLASSES },
    perturbations: [],
    numerics: { breakPoints_s: [] },
    ...changes,
  }
  const document = { output: { size_distribution: 'auto', state_every_h: 2 } }
  return { scenario, document, warnings: ['a warning'] } as unknown as LoadedScenario
}

export function standInRequest(
  workingDirectory: string,
  changes: Partial<RunRequest> = {},
): RunRequest {
  return {
    loaded: standInScenario(),
    target: { out: 'run', force: false, scenarioName: 'stand-in', workingDirectory },
    from: null,
    identity: { name: 'mesofrost', version: '0.0.0', model: 'none', libraries: {} },
    model: standInModel(),
    stop: { signal: () => null },
    begin: async () => silentProgress,
    ...changes,
  }
}
