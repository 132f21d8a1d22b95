/**
 * The scenario document as users write it, in YAML or JSON. Strict, unit-suffixed, every key with a default:
 * the empty document is the quiet polar-summer night.
 */
import { z } from 'zod'
import { gridDefaults, pressureDefaults, runDefaults } from './defaults.ts'
import { quantity, section, wholeNumber } from './fields.ts'
import { perturbationsList, randomWaves, wavesList } from './forcingSchema.ts'
import { channelsList, numericsSection, outputSection } from './outputSchema.ts'
import {
  iceSection,
  initialSection,
  nucleationSection,
  processesSection,
  sizesSection,
} from './particleSchema.ts'
import {
  mixingSection,
  nucleiSection,
  photolysisSection,
  temperatureSection,
  waterSection,
  windSection,
} from './profileSchema.ts'

const text = (meaning: string) => z.string().max(10_000).optional().describe(meaning)

export const scenarioSchema = z
  .strictObject({
    title: z
      .string()
      .max(200)
      .default(runDefaults.title.value)
      .describe(`Short title. Default ${runDefaults.title.value}: ${runDefaults.title.reason}.`),
    question: text('The question that the scenario answers. Default: none.'),
    origin: text('Where the numbers come from. Default: none.'),
    extends: text(
      'Another scenario to start from: a file, relative to this one, or the name of a shipped scenario. Default: none, the quiet night.',
    ),
    start_utc: z.iso
      .datetime()
      .optional()
      .describe(
        'Date and time of the start, such as 2026-07-01T00:00:00Z; a label without effect on the physics. Default: none.',
      ),
    duration_h: quantity(
      'Length of the run',
      { unit: 'h', above: 0, to: 10_000 },
      runDefaults.duration_h,
    ),
    output_every_min: quantity(
      'Interval of the output, at most the length of the run',
      { unit: 'min', above: 0, to: 1e5 },
      runDefaults.output_every_min,
    ),
    grid: section('Cells in altitude', {
      bottom_km: quantity('Bottom', { unit: 'km', from: 0, to: 150 }, gridDefaults.bottom_km),
      top_km: quantity('Top', { unit: 'km', from: 0, to: 150 }, gridDefaults.top_km),
      levels: wholeNumber('Number of cells', { from: 4, to: 2000 }, gridDefaults.levels),
    }),
    sizes: sizesSection,
    pressure: section('The one pressure that the hydrostatic column hangs on', {
      altitude_km: quantity(
        'Altitude of the reference pressure',
        { unit: 'km', from: 0, to: 150 },
        pressureDefaults.altitude_km,
      ),
      pressure_Pa: quantity(
        'Pressure there',
        { unit: 'Pa', above: 0, to: 1e4 },
        pressureDefaults.pressure_Pa,
      ),
    }),
    temperature: temperatureSection,
    water: waterSection,
    wind: windSection,
    mixing: mixingSection,
    nuclei: nucleiSection,
    photolysis: photolysisSection,
    waves: wavesList,
    random_waves: randomWaves,
    perturbations: perturbationsList,
    initial: initialSection,
    ice: iceSection,
    nucleation: nucleationSection,
    processes: processesSection,
    numerics: numericsSection,
    channels: channelsList,
    output: outputSection,
  })
  .describe('A mesofrost scenario: polar-summer air, what disturbs it, and what is computed.')

/** A scenario as written: every key may be left out. */
export type ScenarioInput = z.input<typeof scenarioSchema>

/** A scenario with every default filled in. */
export type ScenarioDocument = z.output<typeof scenarioSchema>

/** The JSON Schema of a scenario as written, for editors. */
export function scenarioJsonSchema(): Record<string, unknown> {
  return z.toJSONSchema(scenarioSchema, { io: 'input' }) as Record<string, unknown>
}
