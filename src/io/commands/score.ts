import {
  type Command,
  type CommandArguments,
  type CommandContext,
  countArgument,
  experimentArguments,
  experimentOptions,
  repeatableOption,
} from '../command.ts'

/** Enough for the ends of a 95 % interval to two digits (common practice, no source). */
const RESAMPLES = 1000
const SEED = '1'

const { jobs: _jobs, ...outputOptions } = experimentOptions

export const scoreCommand: Command = {
  name: 'score',
  usage: '<estimates>',
  describe: 'hold the results of a retrieval against the truth',
  positionals: {
    estimates: {
      type: 'string',
      demandOption: true,
      describe:
        'table of estimates (CSV or Arrow): scene_id, quantities named as in the truth, and where there is one the standard deviation of each as QUANTITY_uncertainty; an empty field where the retrieval gave nothing',
    },
  },
  options: {
    truth: {
      type: 'string',
      requiresArg: true,
      demandOption: true,
      describe: 'table of the truth (Arrow or CSV), one row per scene_id',
    },
    threshold: repeatableOption(
      'QUANTITY=VALUE: count hits and false alarms, an event being a value that reaches this one',
    ),
    bins: repeatableOption('QUANTITY=A,B,C: limits between bins of the true value', 'quartiles'),
    seed: {
      type: 'string',
      requiresArg: true,
      default: SEED,
      describe: 'seed of the bootstrap intervals',
    },
    resamples: {
      type: 'string',
      requiresArg: true,
      defaultDescription: String(RESAMPLES),
      describe: 'how often the scenes are drawn anew for the intervals',
    },
    ...outputOptions,
  },
  examples: [
    ['mesofrost score mine.csv --truth truth.arrow', 'bias, scatter and coverage'],
    [
      'mesofrost score mine.csv --truth truth.arrow --threshold column_ice_ug_per_m2=20',
      'and how many of the clouds of 20 ug per m2 or more were found',
    ],
    [
      'mesofrost score mine.csv --truth truth.arrow --bins column_ice_ug_per_m2=10,50,100',
      'and how well thin and thick clouds came out',
    ],
  ],
  async run(args: CommandArguments, context: CommandContext): Promise<number> {
    const [{ scoreEstimates }, { parseBins, parseSeed, parseThresholds }] = await Promise.all([
      import('../scoring/scoreEstimates.ts'),
      import('../scoring/quantityOptions.ts'),
    ])
    return scoreEstimates(
      {
        estimates: args.estimates as string,
        truth: args.truth as string,
        thresholds: parseThresholds(args.threshold as string[]),
        bins: parseBins(args.bins as string[]),
        seed: parseSeed(args.seed as string),
        resamples: countArgument(args, 'resamples') ?? RESAMPLES,
        ...experimentArguments(args),
      },
      context,
    )
  },
}
