import { diagnose } from '../diagnostics/diagnose.ts'
import { summarise } from '../diagnostics/summary.ts'
import { ModelError } from '../errors.ts'
import { resolve } from '../scenario/resolve.ts'
import type { ScenarioDocument } from '../scenario/schema.ts'
import { prepareColumn, type SolverStatistics, simulate } from '../simulate.ts'
import { collectHeadlines, type Headlines } from './headlines.ts'

/** What to keep of a member beside its headlines. */
export interface Keep {
  /** Output times at which the size distribution is kept, h. */
  sceneTimes_h: number[]
}

/** The size distribution of a column at one time. */
export interface Scene {
  time_h: number
  /** Resting altitudes of the levels, km. */
  altitude_km: number[]
  /** True altitudes of the levels as displaced by waves, km. */
  displaced_altitude_km: number[]
  temperature_K: number[]
  pressure_Pa: number[]
  /** Thickness of each displaced layer over that at rest. */
  stretching: number[]
  radii_nm: number[]
  /** True number densities, level by level, 1/m3. */
  numberPerClass_per_m3: number[]
}

/** What is left of one run of a study. A failure of the model is a result too, with its reason. */
export type MemberOutcome =
  | {
      status: 'done'
      headlines: Headlines
      /** Named numbers of the run's summary; null where there is no cloud. */
      diagnostics: Record<string, number | null>
      warnings: string[]
      scenes: Scene[]
      solver: SolverStatistics
    }
  | { status: 'failed'; reason: string }

const SAME_TIME_H = 1e-9

/** Runs one member of a study from its complete scenario document. Pure; does not throw ModelErrors but returns them. */
export function runMember(document: ScenarioDocument, keep: Keep): MemberOutcome {
  const { scenario, warnings } = resolve(document)
  const column = prepareColumn(scenario)
  const summary = summarise(column)
  const headlines = collectHeadlines(scenario)
  const scenes: Scene[] = []
  const events = simulate(column)
  try {
    let event = events.next()
    for (; !event.done; event = events.next()) {
      if (event.value.kind !== 'state') continue
      const diagnosis = diagnose(column, event.value.snapshot)
      summary.add(diagnosis)
      headlines.add(diagnosis)
      const time_h = diagnosis.budget.time_h
      if (!keep.sceneTimes_h.some((time) => Math.abs(time - time_h) < SAME_TIME_H)) continue
      const { profiles, numberPerClass } = diagnosis
      scenes.push({
        time_h,
        altitude_km: Array.from(profiles.altitude_km),
        displaced_altitude_km: Array.from(profiles.displaced_altitude_km),
        temperature_K: Array.from(profiles.temperature_K),
        pressure_Pa: Array.from(profiles.pressure_Pa),
        stretching: Array.from(profiles.stretching),
        radii_nm: Array.from(column.sizes.radii_m, (radius) => radius * 1e9),
        numberPerClass_per_m3: Array.from(numberPerClass),
      })
    }
    const { numbers, warnings: late } = summary.result()
    return {
      status: 'done',
      headlines: headlines.result(),
      diagnostics: numbers,
      warnings: [...warnings, ...late],
      scenes,
      solver: event.value,
    }
  } catch (error) {
    if (!(error instanceof ModelError)) throw error
    return { status: 'failed', reason: describeFailure(error) }
  }
}

function describeFailure({ message, place }: ModelError): string {
  const where = place.altitude_m === null ? '' : `, ${(place.altitude_m / 1000).toFixed(1)} km`
  return `at ${(place.time_s / 3600).toFixed(3)} h${where}: ${message}`
}
