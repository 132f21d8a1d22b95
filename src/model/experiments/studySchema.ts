/** A study as users write it, in YAML or JSON: a scenario, what is varied, how the members are chosen, what is kept. */
import { z } from 'zod'
import { nearestWord } from '../scenario/nearestWord.ts'
import { type Path, problem, ScenarioError, type ScenarioProblem } from '../scenario/problems.ts'
import { shownValue } from '../scenario/validate.ts'

const LARGEST_SEED = 2 ** 32 - 1
const MOST_VALUES = 100_000

const from = z.number().describe('Least value.')
const to = z.number().describe('Greatest value.')
const count = z.int().min(1).max(MOST_VALUES).describe('Number of values, both ends included.')

const axisSchema = z
  .strictObject({
    key: z
      .string()
      .describe(
        'What is varied: the dotted path of a key of the scenario, such as water.factor, temperature.offset_K or waves.0.amplitude_K.',
      ),
    list: z
      .array(z.union([z.number(), z.string(), z.boolean()]))
      .max(MOST_VALUES)
      .optional()
      .describe('These values; in a random design each has the same chance.'),
    linear: z.strictObject({ from, to, count }).optional().describe('Evenly spaced values.'),
    log: z
      .strictObject({ from, to, count })
      .optional()
      .describe('Values evenly spaced in the logarithm.'),
    uniform: z
      .strictObject({ from, to })
      .optional()
      .describe('Uniform distribution; for random designs.'),
    log_uniform: z
      .strictObject({ from, to })
      .optional()
      .describe('Distribution that is uniform in the logarithm; for random designs.'),
    normal: z
      .strictObject({
        mean: z.number().describe('Mean before the cut.'),
        standard_deviation: z.number().gt(0).describe('Standard deviation before the cut.'),
        from: from.optional().describe('Lower cut. Default: three standard deviations below.'),
        to: to.optional().describe('Upper cut. Default: three standard deviations above.'),
      })
      .optional()
      .describe('Normal distribution, cut off on both sides; for random designs.'),
  })
  .describe('One axis: a key, and its values or their distribution.')

export type AxisDocument = z.output<typeof axisSchema>

/** The ways to give the values of an axis. */
export const axisForms = ['list', 'linear', 'log', 'uniform', 'log_uniform', 'normal'] as const

export const studySchema = z
  .strictObject({
    title: z.string().max(200).default('untitled study').describe('Short title.'),
    question: z.string().max(10_000).optional().describe('The question that the study answers.'),
    base: z
      .string()
      .min(1)
      .default('quiet-night')
      .describe('The scenario that is varied: a file, relative to this one, or a shipped name.'),
    axes: z.array(axisSchema).describe('What is varied.'),
    design: z
      .enum(['grid', 'latin_hypercube', 'sobol'])
      .default('grid')
      .describe(
        'grid: every combination, gives slopes; latin_hypercube: samples spread evenly over each axis; sobol: gives shares of the variance, at samples x (axes + 2) members.',
      ),
    samples: z
      .int()
      .min(1)
      .max(1e7)
      .optional()
      .describe('For random designs: how many; for sobol best a power of two.'),
    seed: z
      .int()
      .min(0)
      .max(LARGEST_SEED)
      .default(1)
      .describe('Seed of random designs and of bootstrap intervals.'),
    diagnostics: z
      .array(z.string())
      .min(1)
      .optional()
      .describe('Names of the summary numbers to keep. Default: all but residuals of budgets.'),
    last_hours_mean: z
      .number()
      .gt(0)
      .optional()
      .describe(
        'Adds the means over so many last hours of the run, h: mean_column_ice_ug_per_m2, mean_albedo_<channel>_per_sr and its Lorenz-Mie counterpart. Default: none.',
      ),
    keep: z
      .strictObject({
        scene_times_h: z
          .array(z.number().gte(0))
          .max(10_000)
          .default([])
          .describe('Output times at which size distributions are kept, h. Default: none.'),
      })
      .prefault({})
      .describe('What is kept beside the diagnostics.'),
  })
  .describe('A mesofrost study: many runs of one scenario with some of its keys varied.')

/** A study as written: keys with defaults may be left out. */
export type StudyInput = z.input<typeof studySchema>

/** A study with every default filled in. */
export type Study = z.output<typeof studySchema>

/** Holds a document against the schema of a study. Throws a ScenarioError with the paths of the keys at fault. */
export function parseStudy(document: unknown): Study {
  const result = studySchema.safeParse(document)
  if (result.success) return result.data
  throw new ScenarioError(result.error.issues.flatMap((issue) => problemsOf(issue, document)))
}

function problemsOf(issue: z.core.$ZodIssue, document: unknown): ScenarioProblem[] {
  const path = issue.path as Path
  if (issue.code === 'unrecognized_keys') {
    return issue.keys.map((key) => unknownKey(path, key))
  }
  const value = path.reduce<unknown>(
    (owner, step) => (owner as Record<string | number, unknown> | undefined)?.[step],
    document,
  )
  const what = value === undefined ? 'is missing' : `${shownValue(value)} is not allowed`
  return [problem(path, `${what}; ${issue.message.replace(/^Invalid \w+: /, '')}`)]
}

function unknownKey(path: Path, key: string): ScenarioProblem {
  const known = keysAt(path)
  const nearest = nearestWord(key, known)
  const hint = nearest === null ? '' : `; did you mean ${nearest}?`
  return {
    path: [...path, key],
    at: 'key',
    message: `unknown key; allowed here: ${known.join(', ')}${hint}`,
  }
}

interface SchemaNode {
  properties?: Record<string, SchemaNode>
  items?: SchemaNode
}

function keysAt(path: Path): string[] {
  let node: SchemaNode | undefined = studyJsonSchema()
  for (const step of path) {
    node = typeof step === 'number' ? node?.items : node?.properties?.[step]
  }
  return Object.keys(node?.properties ?? {})
}

/** The JSON Schema of a study as written, for editors. */
export function studyJsonSchema(): Record<string, unknown> {
  return z.toJSONSchema(studySchema, { io: 'input' }) as Record<string, unknown>
}
