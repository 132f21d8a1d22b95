import { columnModel } from './columnModel.ts'
import type { CommandContext } from './command.ts'
import { describeScenario } from './describeScenario.ts'
import { DONE } from './exitCodes.ts'
import { loadScenario } from './scenario/loadScenario.ts'
import { print, warn } from './terminal.ts'
import { pairLines, shortNumber, textTable } from './textTable.ts'
import { formatTime, parseTime } from './timeText.ts'

export interface CheckArguments {
  scenario: string
  set: string[]
  at: string
  json: boolean
  quiet: boolean
}

/** Tells what a scenario means without integrating anything. */
export async function checkScenario(
  args: CheckArguments,
  context: CommandContext,
): Promise<number> {
  const { terminal, scenarioDirectory } = context
  const time_s = parseTime(args.at)
  const { scenario, warnings } = loadScenario(args.scenario, {
    set: args.set,
    shippedDirectory: scenarioDirectory,
    workingDirectory: terminal.workingDirectory,
  })
  const column = columnModel.prepareColumn(scenario)
  const { variables, columns, errors } = columnModel.backgroundTable(column, time_s)
  if (args.json) {
    const numbers = Object.fromEntries(
      Object.entries(columns).map(([name, values]) => [name, Array.from(values)]),
    )
    const background = { time_s, variables, columns: numbers, errors }
    await print(terminal, `${JSON.stringify({ scenario, warnings, background })}\n`)
    return DONE
  }
  if (!args.quiet) for (const warning of warnings) warn(terminal, `warning: ${warning}`)
  await print(terminal, `${scenario.title}\n\nUnderstood, in SI units:\n`)
  await print(terminal, pairLines(describeScenario(scenario)))
  await print(terminal, `\nThe air at ${formatTime(time_s)}:\n`)
  await print(terminal, textTable(variables.map(({ name }) => ({ name, values: columns[name] }))))
  const errorPairs = Object.entries(errors).map(([name, value]): [string, string] => [
    name,
    shortNumber(value),
  ])
  await print(terminal, `\nErrors of this grid:\n${pairLines(errorPairs)}`)
  return DONE
}
