import {
  type Command,
  type CommandArguments,
  type CommandContext,
  experimentArguments,
  experimentOptions,
  scenarioPositional,
  setOption,
} from '../command.ts'

export const convergeCommand: Command = {
  name: 'converge',
  usage: '<scenario>',
  describe: 'halve level spacing, class width and tolerance in turn and tell the error bars',
  positionals: { scenario: { ...scenarioPositional, demandOption: true } },
  options: { set: setOption, ...experimentOptions },
  examples: [
    ['mesofrost converge quiet-night', 'what to quote as the error of its numbers'],
    ['mesofrost converge my.yaml --set duration_h=6', 'sooner, for the first hours'],
  ],
  async run(args: CommandArguments, context: CommandContext): Promise<number> {
    const { convergeScenario } = await import('../study/convergeScenario.ts')
    return convergeScenario(
      {
        scenario: args.scenario as string,
        set: args.set as string[],
        ...experimentArguments(args),
      },
      context,
    )
  },
}
