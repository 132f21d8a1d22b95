import {
  type Command,
  type CommandArguments,
  type CommandContext,
  countArgument,
  jobsOption,
  jsonOption,
  outOption,
  quietOption,
  setOption,
} from '../command.ts'

const MOST_MEMBERS = 100_000

export const sweepCommand: Command = {
  name: 'sweep',
  usage: '<study>',
  describe: 'run a scenario many times with varied keys and tabulate what responds',
  positionals: {
    study: {
      type: 'string',
      demandOption: true,
      describe: 'a study file (YAML or JSON), or the name of a shipped study',
    },
  },
  options: {
    set: setOption,
    out: {
      ...outOption,
      describe:
        'directory of the study; one that holds this study already is gone on with. Without it the next free one of runs/',
    },
    force: {
      type: 'boolean',
      default: false,
      describe: 'throw away the study that --out holds and begin anew',
    },
    part: {
      type: 'string',
      requiresArg: true,
      describe: 'i/n: only the i-th of n shares, into an --out that all shares have in common',
    },
    jobs: jobsOption,
    'max-members': {
      type: 'string',
      requiresArg: true,
      defaultDescription: String(MOST_MEMBERS),
      describe: 'refuse a study of more members',
    },
    retry: {
      type: 'boolean',
      default: false,
      describe: 'try members again that have been given up after three crashes',
    },
    json: jsonOption,
    quiet: quietOption,
  },
  examples: [
    ['mesofrost sweep brightness-against-water', 'a shipped study, on all cores'],
    ['mesofrost sweep my-study.yaml -o water', 'repeat the line after Ctrl-C to go on'],
    ['mesofrost sweep my-study.yaml -o water --part 2/5', 'one of five processes or machines'],
  ],
  async run(args: CommandArguments, context: CommandContext): Promise<number> {
    const { runSweep } = await import('../study/runSweep.ts')
    return runSweep(
      {
        study: args.study as string,
        set: args.set as string[],
        out: (args.out as string | undefined) ?? null,
        force: args.force === true,
        jobs: countArgument(args, 'jobs'),
        part: (args.part as string | undefined) ?? null,
        maxMembers: countArgument(args, 'max-members') ?? MOST_MEMBERS,
        retry: args.retry === true,
        json: args.json === true,
        quiet: args.quiet === true,
      },
      context,
    )
  },
}
