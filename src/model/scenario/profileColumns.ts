import type { Path } from './problems.ts'
import { type ProfileName, profileQuantities } from './profileQuantities.ts'
import type { ScenarioDocument } from './schema.ts'

/** A profile at one time in the user's units, in whichever form it was written. */
export interface ProfileColumn {
  time_h: number
  altitudes_km: number[]
  values: number[]
  /** Path of the form, and of the altitude in a row of it. */
  path: Path
  altitudePath(row: number): Path
}

type Row = Record<string, number>

interface Forms {
  knots?: Row[] | undefined
  table?: Record<string, number[]> | undefined
  series?: ({ time_h: number } & Forms)[] | undefined
}

/** The columns of a profile, one per time; none when it is still a file. */
export function profileColumns(document: ScenarioDocument, name: ProfileName): ProfileColumn[] {
  const { key } = profileQuantities[name]
  const forms = document[name] as Forms
  if (forms.series === undefined) return columnAt(forms, { key, path: [name], time_h: 0 })
  return forms.series.flatMap((entry, i) =>
    columnAt(entry, { key, path: [name, 'series', i], time_h: entry.time_h }),
  )
}

function columnAt(
  { knots, table }: Forms,
  { key, path, time_h }: { key: string; path: Path; time_h: number },
): ProfileColumn[] {
  if (knots !== undefined) {
    return [
      {
        time_h,
        altitudes_km: knots.map((knot) => knot.altitude_km),
        values: knots.map((knot) => knot[key]),
        path: [...path, 'knots'],
        altitudePath: (row) => [...path, 'knots', row, 'altitude_km'],
      },
    ]
  }
  if (table === undefined) return []
  return [
    {
      time_h,
      altitudes_km: table.altitude_km,
      values: table[key],
      path: [...path, 'table'],
      altitudePath: (row) => [...path, 'table', 'altitude_km', row],
    },
  ]
}
