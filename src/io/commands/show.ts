import {
  type Command,
  type CommandArguments,
  type CommandContext,
  jsonOption,
  quietOption,
} from '../command.ts'

export const showCommand: Command = {
  name: 'show',
  usage: '<path>',
  describe: 'print output as a table: an Arrow file, or a run directory',
  positionals: {
    path: { type: 'string', demandOption: true, describe: 'an Arrow file or a run directory' },
  },
  options: {
    at: {
      type: 'string',
      requiresArg: true,
      describe: 'only the rows of the output time nearest to this one, such as 12h or 90min',
    },
    variables: {
      type: 'string',
      requiresArg: true,
      describe: 'only these columns, by name, separated by commas',
    },
    csv: {
      type: 'boolean',
      conflicts: 'json',
      describe: 'comma-separated values with all digits',
    },
    json: { ...jsonOption, default: undefined },
    quiet: quietOption,
  },
  examples: [
    ['mesofrost show runs/quiet-night-001', 'how the run went, and its brightness'],
    ['mesofrost show runs/quiet-night-001 --at 12h', 'the profile at twelve hours'],
    [
      'mesofrost show runs/quiet-night-001/profiles.arrow --variables temperature_K --csv',
      'one variable at all times, for a spreadsheet',
    ],
  ],
  async run(args: CommandArguments, context: CommandContext): Promise<number> {
    const { showOutput } = await import('../showOutput.ts')
    return showOutput(
      args.path as string,
      {
        at: (args.at as string | undefined) ?? null,
        variables:
          (args.variables as string | undefined)?.split(',').map((name) => name.trim()) ?? null,
        form: args.csv ? 'csv' : args.json ? 'json' : 'table',
        quiet: args.quiet === true,
      },
      context.terminal,
    )
  },
}
