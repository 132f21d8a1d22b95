import type { Command, CommandContext } from '../command.ts'
import { DONE } from '../exitCodes.ts'
import { print } from '../terminal.ts'

export const schemaCommand: Command = {
  name: 'schema',
  usage: '',
  describe: 'print the JSON Schema of scenarios, for editors',
  positionals: {},
  options: {},
  examples: [['mesofrost schema > mesofrost.schema.json', 'for completion and help in an editor']],
  async run(_args, { terminal }: CommandContext): Promise<number> {
    const { scenarioJsonSchema } = await import('../../model/scenario/schema.ts')
    await print(terminal, `${JSON.stringify(scenarioJsonSchema(), null, 2)}\n`)
    return DONE
  },
}
