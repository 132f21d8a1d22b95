import { isWithin } from '../../model/scoring/coverage.ts'
import type { SceneMatch } from '../../model/scoring/matchScenes.ts'
import type { QuantityColumns } from '../../model/scoring/pairedCases.ts'
import type { TableField } from '../arrow/tableField.ts'
import { TableWriter } from '../arrow/tableWriter.ts'
import { numberField, textField } from '../study/unitOfName.ts'
import { DRAW, SCENE_ID } from './sceneTable.ts'

const ROWS_PER_BATCH = 4096
const OF_QUANTITY = 'in the unit that the name of the quantity ends in'

/** What residuals.arrow is made of. */
export interface Residuals {
  match: SceneMatch
  /** Scenes by row of the truth. */
  scenes: readonly string[]
  /** Draws by row of the estimates; null where there are none. */
  draws: readonly string[] | null
  quantities: readonly (readonly [name: string, columns: QuantityColumns])[]
}

function ofQuantity(name: string, longName: string): TableField {
  return { ...numberField(name, `${longName}, ${OF_QUANTITY}`), unit: '' }
}

function residualFields(hasDraws: boolean): TableField[] {
  return [
    textField(SCENE_ID, 'name of the scene'),
    ...(hasDraws ? [textField(DRAW, 'which of several observations of the scene')] : []),
    textField('quantity', 'what was estimated'),
    ofQuantity('truth', 'true value'),
    ofQuantity('estimate', 'estimated value'),
    ofQuantity('residual', 'estimate less truth'),
    ofQuantity('uncertainty', 'one standard deviation as stated with the estimate'),
    numberField('within', '1 where the truth lies within the uncertainty of the estimate, else 0'),
  ]
}

/** Writes one row per quantity and pair of estimate and truth, in the order of the truth. */
export function writeResiduals(path: string, residuals: Residuals): void {
  const table = new TableWriter(path, {
    fields: residualFields(residuals.draws !== null),
    metadata: [
      ['format', 'mesofrost-residuals'],
      ['format_version', '1'],
    ],
    rowsPerBatch: ROWS_PER_BATCH,
  })
  for (const [name, columns] of residuals.quantities)
    table.append(rowsOf(name, columns, residuals), residuals.match.pairs.length)
  table.close()
}

function rowsOf(
  name: string,
  columns: QuantityColumns,
  { match: { pairs }, scenes, draws }: Residuals,
) {
  const truth = pairs.map(({ truthRow }) => columns.truth[truthRow])
  const estimate = pairs.map(({ estimateRow }) => columns.estimate[estimateRow])
  const uncertainty = pairs.map(({ estimateRow }) => columns.uncertainty[estimateRow])
  return {
    [SCENE_ID]: pairs.map(({ truthRow }) => scenes[truthRow]),
    [DRAW]: pairs.map(({ estimateRow }) => draws?.[estimateRow] ?? ''),
    quantity: pairs.map(() => name),
    truth,
    estimate,
    residual: estimate.map((value, i) => value - truth[i]),
    uncertainty,
    within: estimate.map((value, i) => {
      const isCovered = isWithin(truth[i], value, uncertainty[i])
      return isCovered === null ? Number.NaN : Number(isCovered)
    }),
  }
}
