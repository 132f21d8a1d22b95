import { InputError } from '../errors.ts'
import type { ScenarioDocument } from '../scenario/schema.ts'
import { list, logUniform, normal, type Quantile, uniform } from './designs/distributions.ts'
import { chanceBetween } from './designs/normalQuantile.ts'
import { type KeyKind, keyKind } from './scalarKeys.ts'
import type { KeyValue } from './setKey.ts'
import { type AxisDocument, axisForms } from './studySchema.ts'

/** One varied key. */
export interface StudyAxis {
  key: string
  /** A number, or a word or switch. */
  kind: KeyKind
  /** The values of an axis that has single ones; null for a distribution. */
  values: readonly KeyValue[] | null
  /** The value at a share of the distribution, 0 to 1; single values have equal chances. */
  quantile: Quantile<KeyValue>
}

/** Makes an axis ready. Throws an InputError when its key or its values make no sense. */
export function studyAxis(axis: AxisDocument, base: ScenarioDocument): StudyAxis {
  const kind = keyKind(base, axis.key)
  const given = axisForms.filter((form) => axis[form] !== undefined)
  if (given.length !== 1) {
    const found = given.length === 0 ? 'none' : given.join(' and ')
    throw new InputError(`${axis.key} has ${found}; expected one of ${axisForms.join(', ')}`)
  }
  const values = valuesOf(axis)
  if (values === null) return { key: axis.key, kind, values, quantile: quantileOf(axis) }
  if (values.length === 0) {
    throw new InputError(`${axis.key}: its list is empty; expected at least one value`)
  }
  if (new Set(values).size < values.length) {
    throw new InputError(`${axis.key}: a value stands twice in its list; expected each once`)
  }
  return { key: axis.key, kind, values, quantile: list(values) }
}

const DECIMAL_DIGITS = 14

/** Without the last digits that a fraction of a span spoils: 0.3, not 0.30000000000000004. */
function decimal(value: number): number {
  return Number(value.toPrecision(DECIMAL_DIGITS))
}

function valuesOf(axis: AxisDocument): readonly KeyValue[] | null {
  const { key, list: values, linear, log } = axis
  if (values !== undefined) return values
  const steps = linear ?? log
  if (steps === undefined) return null
  const { from, to, count } = steps
  if (log !== undefined) refuseNotPositive(key, 'log', from, to)
  if (count > 1 ? from === to : from !== to) {
    throw new InputError(
      `${key}: ${count} values from ${from} to ${to}; expected two or more, apart`,
    )
  }
  const at = linear === undefined ? logUniform(from, to) : uniform(from, to)
  return Array.from({ length: count }, (_, i) => decimal(at(i / Math.max(count - 1, 1))))
}

function quantileOf({ key, uniform: even, log_uniform, normal: bell }: AxisDocument): Quantile {
  if (even !== undefined) {
    refuseUnordered(key, even.from, even.to)
    return uniform(even.from, even.to)
  }
  if (log_uniform !== undefined) {
    refuseUnordered(key, log_uniform.from, log_uniform.to)
    refuseNotPositive(key, 'log_uniform', log_uniform.from, log_uniform.to)
    return logUniform(log_uniform.from, log_uniform.to)
  }
  return bellQuantile(key, bell as NonNullable<typeof bell>)
}

const DEFAULT_CUT = 3
/** Below this chance the quantile of a cut normal distribution loses its digits. */
const LEAST_CHANCE = 1e-6

function bellQuantile(key: string, bell: NonNullable<AxisDocument['normal']>): Quantile {
  const { mean, standard_deviation } = bell
  const from = bell.from ?? mean - DEFAULT_CUT * standard_deviation
  const to = bell.to ?? mean + DEFAULT_CUT * standard_deviation
  refuseUnordered(key, from, to)
  const inside = chanceBetween((from - mean) / standard_deviation, (to - mean) / standard_deviation)
  if (inside < LEAST_CHANCE) {
    throw new InputError(
      `${key}: hardly anything of the normal distribution lies from ${from} to ${to}; expected a chance above ${LEAST_CHANCE}`,
    )
  }
  return normal({ mean, standard_deviation, from, to })
}

function refuseUnordered(key: string, from: number, to: number): void {
  if (from < to) return
  throw new InputError(`${key}: from ${from} to ${to}; expected the lesser value first`)
}

function refuseNotPositive(key: string, form: string, from: number, to: number): void {
  if (from > 0 && to > 0) return
  throw new InputError(`${key}: ${form} from ${from} to ${to}; expected values above 0`)
}
