import {
  type Command,
  type CommandArguments,
  type CommandContext,
  jsonOption,
  quietOption,
  scenarioPositional,
  setOption,
} from '../command.ts'

export const checkCommand: Command = {
  name: 'check',
  usage: '<scenario>',
  describe:
    'tell what was understood of a scenario, in SI units, and show its air; integrates nothing',
  positionals: { scenario: { ...scenarioPositional, demandOption: true } },
  options: {
    set: setOption,
    at: {
      type: 'string',
      requiresArg: true,
      default: '0h',
      describe: 'time at which the air is shown, such as 12h',
    },
    json: jsonOption,
    quiet: quietOption,
  },
  examples: [
    ['mesofrost check my.yaml', 'before running it'],
    ['mesofrost check wave-one-hour --at 30min', 'the air as the wave has moved it'],
    [
      'mesofrost check quiet-night --set temperature.offset_K=5',
      'a warmer night: hydrostatics solved again',
    ],
  ],
  async run(args: CommandArguments, context: CommandContext): Promise<number> {
    const { checkScenario } = await import('../checkScenario.ts')
    return checkScenario(
      {
        scenario: args.scenario as string,
        set: args.set as string[],
        at: args.at as string,
        json: args.json === true,
        quiet: args.quiet === true,
      },
      context,
    )
  },
}
