import { join } from 'node:path'
import { InputError } from '../../model/errors.ts'
import type { TableField } from '../arrow/tableField.ts'
import { readTable, type TableHead, type TableRows } from '../arrow/tableReader.ts'
import { type RunRecord, readRunRecord } from '../runRecord.ts'
import type { BrightnessSeries, ChannelSeries } from './brightnessChart.ts'
import type { Night } from './nightPicture.ts'
import type { TimeHeightField } from './timeHeightField.ts'

type Table = TableHead & TableRows

function numbers({ columns }: Table, name: string): Float64Array {
  const column = columns[name]
  if (!(column instanceof Float64Array)) throw new InputError(`there is no variable '${name}'`)
  return column
}

function fieldNamed({ fields }: Table, name: string): TableField {
  const field = fields.find((candidate) => candidate.name === name)
  if (field === undefined) throw new InputError(`there is no variable '${name}'`)
  return field
}

/** The columns of a table with one row per time and level, as a field over both. */
function timeHeightField(table: Table, name: string): TimeHeightField {
  const { longName, unit } = fieldNamed(table, name)
  return {
    longName,
    unit,
    times_h: Float64Array.from(new Set(numbers(table, 'time_h'))),
    altitudes_km: Float64Array.from(new Set(numbers(table, 'altitude_km'))),
    values: numbers(table, name),
  }
}

function channelSeries(table: Table, { name, geometry }: Channel): ChannelSeries {
  const rows = (table.columns.channel as string[]).flatMap((channel, row) =>
    channel === name ? [row] : [],
  )
  const ofChannel = (column: Float64Array) => Float64Array.from(rows, (row) => column[row])
  return {
    label: `${name.replace(/nm$/, ' nm')} ${geometry}`,
    rayleigh: ofChannel(numbers(table, 'albedo_per_sr')),
    mie: ofChannel(numbers(table, 'albedo_mie_per_sr')),
  }
}

type Channel = RunRecord['scenario']['channels'][number]

/** The first channel that looks down and the first lidar, as far as the run has them. */
function chosenChannels(channels: readonly Channel[]): Channel[] {
  const kinds = ['albedo', 'backscatter']
  return kinds.flatMap((kind) => channels.find(({ geometry }) => geometry === kind) ?? [])
}

function brightnessSeries(table: Table, channels: readonly Channel[]): BrightnessSeries {
  return {
    times_h: Float64Array.from(new Set(numbers(table, 'time_h'))),
    unit: fieldNamed(table, 'albedo_per_sr').unit,
    channels: chosenChannels(channels).map((channel) => channelSeries(table, channel)),
  }
}

function description({ summary, scenario }: RunRecord): string {
  const told = (name: string, digits: number) => summary[name]?.toFixed(digits)
  const course = `Above, ice water content against time, 0 to ${scenario.duration_h} h, and altitude; below, the brightness of the column on a logarithmic scale, in the Rayleigh limit and for Lorenz-Mie spheres.`
  if (summary.peak_altitude_km === null) return `${course} No ice is left at the end.`
  return `${course} At the end the layer has its peak at ${told('peak_altitude_km', 1)} km with ${told('ice_water_content_ng_per_m3', 0)} nanograms of ice per cubic metre, and is ${told('thickness_km', 1)} km thick at half of the peak.`
}

/** What the picture of a run needs, from its directory. */
export async function readNight(directory: string): Promise<Night> {
  const record = readRunRecord(directory)
  const profiles = await readTable(join(directory, 'profiles.arrow'))
  const brightness = await readTable(join(directory, 'brightness.arrow'))
  return {
    title: record.title,
    description: description(record),
    iceWaterContent: timeHeightField(profiles, 'ice_water_content_ng_per_m3'),
    saturationRatio: timeHeightField(profiles, 'saturation_ratio'),
    brightness: brightnessSeries(brightness, record.scenario.channels),
  }
}
