import {
  type Command,
  type CommandArguments,
  type CommandContext,
  experimentArguments,
  experimentOptions,
  scenarioPositional,
  setOption,
} from '../command.ts'

export const responseMapCommand: Command = {
  name: 'response-map',
  usage: '<scenario>',
  describe: 'map where and when the brightness responds to a small change',
  positionals: { scenario: { ...scenarioPositional, demandOption: true } },
  options: {
    quantity: {
      type: 'string',
      requiresArg: true,
      choices: ['temperature', 'water', 'wind', 'mixing', 'nuclei'],
      default: 'temperature',
      describe: 'what is changed, at fixed air density',
    },
    amount: {
      type: 'string',
      requiresArg: true,
      defaultDescription: '+1K, +5%, +0.5cm/s, +10%, +10%',
      describe: 'size of the change',
    },
    bands: {
      type: 'string',
      requiresArg: true,
      default: '80..92/2km',
      describe: 'lower edge of the first band, upper edge of the last, and thickness',
    },
    onsets: {
      type: 'string',
      requiresArg: true,
      defaultDescription: 'six over the run',
      describe:
        'first onset, last onset and the step between, such as 0..20/4h; or one, such as 6h',
    },
    duration: {
      type: 'string',
      requiresArg: true,
      default: '1h',
      describe: 'how long each change lasts',
    },
    at: {
      type: 'string',
      requiresArg: true,
      conflicts: 'mean',
      defaultDescription: 'the end of the run',
      describe: 'output time at which the brightness is looked at, such as 12h',
    },
    mean: {
      type: 'string',
      requiresArg: true,
      describe: 'span over which the mean brightness is looked at, such as 18..24h',
    },
    set: setOption,
    ...experimentOptions,
  },
  examples: [
    ['mesofrost response-map quiet-night', 'where and when the cloud remembers its temperature'],
    [
      'mesofrost response-map quiet-night --bands 80..90/1km --onsets 0..22/2h --mean 18..24h',
      'a finer lattice, against the mean of the last hours',
    ],
    ['mesofrost response-map my.yaml --quantity water --amount +10%', 'the same for water vapour'],
  ],
  async run(args: CommandArguments, context: CommandContext): Promise<number> {
    const [{ mapResponse }, { responseMapOptions }] = await Promise.all([
      import('../study/mapResponse.ts'),
      import('../study/responseMapOptions.ts'),
    ])
    return mapResponse(
      {
        scenario: args.scenario as string,
        set: args.set as string[],
        options: responseMapOptions(args),
        ...experimentArguments(args),
      },
      context,
    )
  },
}
