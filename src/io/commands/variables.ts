import type { Variable } from '../../model/diagnostics/variables.ts'
import {
  type Command,
  type CommandArguments,
  type CommandContext,
  jsonOption,
  scenarioPositional,
  setOption,
} from '../command.ts'
import { DONE } from '../exitCodes.ts'
import { print } from '../terminal.ts'
import { textTable } from '../textTable.ts'

function tableOf(variables: Variable[]): string {
  return textTable([
    { name: 'variable', values: variables.map(({ name }) => name) },
    { name: 'unit', values: variables.map(({ unit }) => unit) },
    { name: 'meaning', values: variables.map(({ longName }) => longName) },
    { name: 'CF standard name', values: variables.map(({ standardName }) => standardName ?? '') },
  ])
}

export const variablesCommand: Command = {
  name: 'variables',
  usage: '[scenario]',
  describe: 'list every output variable with its unit and meaning',
  positionals: { scenario: { ...scenarioPositional, default: 'quiet-night' } },
  options: { set: setOption, json: jsonOption },
  examples: [
    ['mesofrost variables', 'what the default night writes'],
    ['mesofrost variables my.yaml --json', 'with the channels of a scenario of yours'],
  ],
  async run(args: CommandArguments, context: CommandContext): Promise<number> {
    const { columnModel: model } = await import('../columnModel.ts')
    const { loadScenario } = await import('../scenario/loadScenario.ts')
    const { terminal } = context
    const { scenario } = loadScenario(args.scenario as string, {
      set: args.set as string[],
      shippedDirectory: context.scenarioDirectory,
      workingDirectory: terminal.workingDirectory,
    })
    const files: Record<string, Variable[]> = {
      'profiles.arrow': model.profileVariables(scenario),
      'size-distribution.arrow': model.sizeVariables(scenario),
      'brightness.arrow': model.brightnessVariables(scenario),
      'budget.arrow': model.budgetVariables(scenario),
    }
    if (args.json) await print(terminal, `${JSON.stringify(files)}\n`)
    else
      for (const [file, variables] of Object.entries(files))
        await print(terminal, `${file}\n${tableOf(variables)}\n`)
    return DONE
  },
}
