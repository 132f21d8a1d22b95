import { writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { InputError } from '../../model/errors.ts'
import { matchScenes, namesText, type SceneMatch } from '../../model/scoring/matchScenes.ts'
import { pairedCases } from '../../model/scoring/pairedCases.ts'
import { CONFIDENCE } from '../../model/scoring/percentileInterval.ts'
import { type QuantityScore, scoreQuantity } from '../../model/scoring/scoreQuantity.ts'
import type { CommandContext } from '../command.ts'
import {
  type Conclusion,
  conductExperiment,
  type ExperimentArguments,
} from '../study/conductExperiment.ts'
import { fileStem } from '../study/fileStem.ts'
import { unitOfName } from '../study/unitOfName.ts'
import { type CommonQuantities, commonQuantities } from './commonQuantities.ts'
import { refuseUnscored } from './quantityOptions.ts'
import { readSceneTable } from './readSceneTable.ts'
import { writeResiduals } from './residualTable.ts'
import { drawsOf, numbersOf, type SceneTable, sceneIds, UNCERTAINTY } from './sceneTable.ts'
import { counted, scoreText } from './scoreText.ts'

export interface ScoreArguments extends ExperimentArguments {
  /** The files as the user typed them. */
  estimates: string
  truth: string
  thresholds: Map<string, number>
  bins: Map<string, number[]>
  seed: number
  resamples: number
}

/** Holds a table of estimates against the truth. */
export async function scoreEstimates(
  args: ScoreArguments,
  context: CommandContext,
): Promise<number> {
  const { workingDirectory } = context.terminal
  const estimates = readSceneTable(args.estimates, 'estimates', workingDirectory)
  const truth = readSceneTable(args.truth, 'truth', workingDirectory)
  const scoring = prepareScoring(estimates, truth)
  refuseUnscored('threshold', args.thresholds.keys(), scoring.common.scored)
  refuseUnscored('bins', args.bins.keys(), scoring.common.scored)
  return conductExperiment(
    {
      kind: 'score',
      name: `${fileStem(args.estimates)}-score`,
      tasks: () => [],
      conclude: async (_ends, partialPath) => conclude(scoring, args, partialPath),
    },
    args,
    context,
  )
}

/** Everything that can be wrong with the tables comes out here, before anything is written. */
function prepareScoring(estimates: SceneTable, truth: SceneTable) {
  const scenes = sceneIds(truth)
  const estimated = sceneIds(estimates)
  const draws = drawsOf(estimates)
  const common = commonQuantities(estimates, truth)
  const match = matchScenes(scenes, estimated, draws)
  if (match.matched === 0)
    throw new InputError(
      `${estimates.name} and ${truth.name} have no scene in common; estimated: ${namesText(match.unknown)}; true: ${namesText(match.missing)}`,
    )
  const quantities = common.scored.map((name) => {
    const columns = {
      truth: numbersOf(truth, name),
      estimate: numbersOf(estimates, name),
      uncertainty: numbersOf(estimates, `${name}${UNCERTAINTY}`, 0),
    }
    return [name, columns] as const
  })
  return { common, match, scenes, draws, quantities }
}

type Scoring = ReturnType<typeof prepareScoring>

function conclude(scoring: Scoring, args: ScoreArguments, partialPath: string): Conclusion {
  const { seed, resamples } = args
  const { match, common, scenes } = scoring
  const scores = scoring.quantities.map(([quantity, columns]) => {
    const threshold = args.thresholds.get(quantity) ?? null
    const cuts = args.bins.get(quantity) ?? null
    const choices = { threshold, cuts, seed, resamples }
    const score = scoreQuantity(pairedCases(match, columns), choices)
    return { quantity, unit: unitOfName(quantity), threshold, ...score }
  })
  const { matched, unknown, missing, duplicate } = match
  const found = {
    scenes: { true: scenes.length, matched, unknown, missing, duplicate },
    unscored: common.unscored.map(({ name }) => name),
    quantities: scores,
  }
  writeScores(join(partialPath, 'scores.json'), { seed, resamples, ...found })
  writeResiduals(join(partialPath, 'residuals.arrow'), scoring)
  return {
    asked: { estimates: args.estimates, truth: args.truth, seed, resamples },
    found,
    text: scores.map((score) => scoreText(score.quantity, score)).join('\n'),
    warnings: [...sceneWarnings(match), ...columnWarnings(common)],
    table: 'residuals.arrow',
    isPartial: false,
  }
}

interface Scores {
  seed: number
  resamples: number
  quantities: QuantityScore[]
}

function writeScores(path: string, scores: Scores): void {
  const head = { format: 'mesofrost-scores', formatVersion: 1, confidence: CONFIDENCE }
  writeFileSync(path, `${JSON.stringify({ ...head, ...scores }, null, 2)}\n`)
}

function sceneWarnings({ unknown, missing, duplicate }: SceneMatch): string[] {
  const kinds = [
    [unknown, 'estimated but not among the truth'],
    [missing, 'of the truth without a row of estimates'],
    [duplicate, 'estimated more than once, of which the first row counts'],
  ] as const
  return kinds
    .filter(([{ count }]) => count > 0)
    .map(([scenes, what]) => `${counted(scenes.count, 'scene')} ${what}: ${namesText(scenes)}`)
}

function columnWarnings({ unscored }: CommonQuantities): string[] {
  if (unscored.length === 0) return []
  const names = unscored.map(({ name, nearest }) =>
    nearest === null ? name : `${name} (did you mean ${nearest}?)`,
  )
  return [`not scored, since the truth has no such quantity: ${names.join(', ')}`]
}
