import {
  type Command,
  type CommandArguments,
  type CommandContext,
  jsonOption,
  quietOption,
  scenarioPositional,
  setOption,
} from '../command.ts'

export const runCommand: Command = {
  name: 'run',
  usage: '[scenario]',
  describe: 'run a scenario into a directory of Arrow files',
  positionals: { scenario: scenarioPositional },
  options: {
    set: setOption,
    out: {
      type: 'string',
      alias: 'o',
      requiresArg: true,
      describe: 'directory to write; without it the next free one of runs/',
    },
    force: {
      type: 'boolean',
      default: false,
      describe: 'replace --out if it is the output of an earlier run',
    },
    from: {
      type: 'string',
      requiresArg: true,
      describe:
        'go on from a state saved in this run directory, with its scenario unless one is given',
    },
    at: {
      type: 'string',
      requiresArg: true,
      implies: 'from',
      describe: 'time of that state, such as 12h; without it the last one',
    },
    json: jsonOption,
    quiet: quietOption,
  },
  examples: [
    ['mesofrost run quiet-night', 'the default night'],
    ['mesofrost run my.yaml --set temperature.offset_K=2 -o warmer', 'a file, two kelvin warmer'],
    ['mesofrost run runs/quiet-night-001/run.json', 'the same run again, byte for byte'],
    ['mesofrost run --from runs/quiet-night-001 --at 12h --set duration_h=48', 'go on for longer'],
  ],
  async run(args: CommandArguments, context: CommandContext): Promise<number> {
    const { runFromCommandLine } = await import('../runFromCommandLine.ts')
    return runFromCommandLine(
      {
        scenario: (args.scenario as string | undefined) ?? null,
        set: args.set as string[],
        out: (args.out as string | undefined) ?? null,
        force: args.force === true,
        from: (args.from as string | undefined) ?? null,
        at: (args.at as string | undefined) ?? null,
        json: args.json === true,
        quiet: args.quiet === true,
      },
      context,
    )
  },
}
