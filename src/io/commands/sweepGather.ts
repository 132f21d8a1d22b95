import {
  type Command,
  type CommandArguments,
  type CommandContext,
  jsonOption,
  quietOption,
} from '../command.ts'

export const sweepGatherCommand: Command = {
  name: 'sweep-gather',
  usage: '<directory>',
  describe: 'assemble a study from the parts that are there and list what is missing',
  positionals: {
    directory: { type: 'string', demandOption: true, describe: 'the directory of the study' },
  },
  options: { json: jsonOption, quiet: quietOption },
  examples: [['mesofrost sweep-gather water', 'after all parts of a sweep, or meanwhile']],
  async run(args: CommandArguments, context: CommandContext): Promise<number> {
    const { gatherSweep } = await import('../study/gatherSweep.ts')
    const style = { json: args.json === true, quiet: args.quiet === true }
    return gatherSweep(args.directory as string, style, context)
  },
}
