import {
  type Command,
  type CommandArguments,
  type CommandContext,
  experimentArguments,
  experimentOptions,
} from '../command.ts'

export const compareCommand: Command = {
  name: 'compare',
  usage: '<control> <changed>',
  describe: 'tell how one run differs from another with equal output times',
  positionals: {
    control: { type: 'string', demandOption: true, describe: 'the run to compare against' },
    changed: { type: 'string', demandOption: true, describe: 'the run to compare' },
  },
  options: {
    floor: {
      type: 'boolean',
      default: false,
      describe: 'measure the numerical floor too, by running both scenarios again more tightly',
    },
    ...experimentOptions,
  },
  examples: [
    ['mesofrost compare runs/quiet-night-001 runs/dry-001', 'how much fainter the dry night is'],
    ['mesofrost compare a b --floor -o a-and-b', 'and whether the numbers carry it'],
  ],
  async run(args: CommandArguments, context: CommandContext): Promise<number> {
    const { compareRuns } = await import('../study/compareRuns.ts')
    return compareRuns(
      {
        control: args.control as string,
        changed: args.changed as string,
        floor: args.floor === true,
        ...experimentArguments(args),
      },
      context,
    )
  },
}
