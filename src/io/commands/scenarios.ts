import { type Command, type CommandArguments, type CommandContext, jsonOption } from '../command.ts'
import { DONE } from '../exitCodes.ts'
import { print } from '../terminal.ts'
import { pairLines } from '../textTable.ts'

export const scenariosCommand: Command = {
  name: 'scenarios',
  usage: '[name]',
  describe: 'list the shipped scenarios with their questions, or print one to start from',
  positionals: { name: { type: 'string', describe: 'the scenario to print' } },
  options: { json: jsonOption },
  examples: [
    ['mesofrost scenarios', 'what there is'],
    ['mesofrost scenarios quiet-night > my.yaml', 'a file of your own to change'],
  ],
  async run(args: CommandArguments, context: CommandContext): Promise<number> {
    const { listShippedScenarios, readShippedScenario } = await import('../shippedScenarios.ts')
    const { terminal, scenarioDirectory } = context
    if (args.name !== undefined) {
      const name = args.name as string
      const text = readShippedScenario(scenarioDirectory, name)
      await print(terminal, args.json ? `${JSON.stringify({ name, text })}\n` : text)
      return DONE
    }
    const { shippedStudies } = await import('../study/loadStudy.ts')
    const scenarios = listShippedScenarios(scenarioDirectory)
    const studies = listShippedScenarios(shippedStudies(scenarioDirectory))
    if (args.json) {
      await print(terminal, `${JSON.stringify({ scenarios, studies })}\n`)
      return DONE
    }
    const lines = (list: typeof scenarios) =>
      pairLines(list.map(({ name, title, question }) => [name, question || title]))
    await print(terminal, lines(scenarios))
    if (studies.length > 0)
      await print(terminal, `\nStudies for mesofrost sweep:\n${lines(studies)}`)
    return DONE
  },
}
