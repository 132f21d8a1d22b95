import { InputError } from '../errors.ts'
import { resolve } from '../scenario/resolve.ts'
import type { ScenarioDocument } from '../scenario/schema.ts'
import { type Column, outputTimes, prepareColumn } from '../simulate.ts'
import { HOUR } from '../units.ts'

/**
 * The same scenarios, made to stop at the same instants: `numerics.break_points_h` of each holds, beside what was there,
 * every break point of one that another lacks. Runs that differ in nothing else are then equal to the byte.
 * Throws an InputError when their output times differ.
 */
export function alignedPair(
  control: ScenarioDocument,
  changed: readonly ScenarioDocument[],
): { control: ScenarioDocument; changed: ScenarioDocument[] } {
  const documents = [control, ...changed]
  const columns = documents.map((document) => prepareColumn(resolve(document).scenario))
  refuseUnequal(columns)
  const breakPoints = columns.map(({ atmosphere }) => new Set(atmosphere.breakPoints_s))
  const further = [...new Set(breakPoints.flatMap((times) => [...times]))].filter(
    (time) => !breakPoints.every((times) => times.has(time)),
  )
  const listed = documents.flatMap(({ numerics }) => numerics.break_points_h)
  const break_points_h = [...new Set([...listed, ...further.map(inHours)])].sort((a, b) => a - b)
  const aligned = documents.map((document) => ({
    ...document,
    numerics: { ...document.numerics, break_points_h },
  }))
  return { control: aligned[0], changed: aligned.slice(1) }
}

/** The hours that come back as exactly these seconds; rounding may put them a last digit beside the quotient. */
function inHours(time_s: number): number {
  const hours = time_s / HOUR
  const neighbours = [hours, hours * (1 - Number.EPSILON), hours * (1 + Number.EPSILON)]
  return neighbours.find((time_h) => time_h * HOUR === time_s) ?? hours
}

function refuseUnequal([control, ...others]: readonly Column[]): void {
  for (const other of others) {
    if (isEqual(outputTimes(control), outputTimes(other))) continue
    throw new InputError(
      `the output times differ: ${outputsText(control)} in the control, ${outputsText(other)} in the changed run; expected equal ones`,
    )
  }
}

function outputsText({ scenario }: Column): string {
  return `every ${scenario.outputInterval_s / 60} min over ${scenario.duration_s / HOUR} h`
}

function isEqual(left: readonly number[], right: readonly number[]): boolean {
  return left.length === right.length && left.every((value, i) => value === right[i])
}
