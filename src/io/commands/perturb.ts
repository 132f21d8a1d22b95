import {
  type Command,
  type CommandArguments,
  type CommandContext,
  experimentArguments,
  experimentOptions,
  repeatableOption,
  scenarioPositional,
  setOption,
} from '../command.ts'

export const perturbCommand: Command = {
  name: 'perturb',
  usage: '<scenario>',
  describe: 'run a scenario without and with a change and tell the response',
  positionals: { scenario: { ...scenarioPositional, demandOption: true } },
  options: {
    change: repeatableOption(
      'QUANTITY:AMOUNT[@Z1..Z2km][@T1..T2h] with temperature, water, wind, mixing or nuclei, at fixed air density; or a YAML or JSON file with a list of perturbations',
    ),
    set: setOption,
    ...experimentOptions,
  },
  examples: [
    [
      'mesofrost perturb quiet-night --change temperature:-1K',
      'a kelvin cooler, everywhere and always',
    ],
    [
      'mesofrost perturb quiet-night --change temperature:+1K@82..84km@3..9h --change water:+10%',
      'two changes, each against the same control',
    ],
    ['mesofrost perturb my.yaml --change pulse.yaml', 'other shapes in altitude and time'],
  ],
  async run(args: CommandArguments, context: CommandContext): Promise<number> {
    const { perturbScenario } = await import('../study/perturbScenario.ts')
    return perturbScenario(
      {
        scenario: args.scenario as string,
        changes: args.change as string[],
        set: args.set as string[],
        ...experimentArguments(args),
      },
      context,
    )
  },
}
