import type { Command, CommandArguments, CommandContext } from '../command.ts'
import { DONE } from '../exitCodes.ts'
import { print } from '../terminal.ts'

export const schemaCommand: Command = {
  name: 'schema',
  usage: '',
  describe: 'print the JSON Schema of scenarios, or of studies, for editors',
  positionals: {},
  options: {
    study: { type: 'boolean', default: false, describe: 'the schema of study files instead' },
  },
  examples: [
    ['mesofrost schema > mesofrost.schema.json', 'for completion and help in an editor'],
    ['mesofrost schema --study > study.schema.json', 'the same for files of mesofrost sweep'],
  ],
  async run(args: CommandArguments, { terminal }: CommandContext): Promise<number> {
    const schema = args.study
      ? (await import('../../model/experiments/study.ts')).studyJsonSchema()
      : (await import('../../model/scenario/schema.ts')).scenarioJsonSchema()
    await print(terminal, `${JSON.stringify(schema, null, 2)}\n`)
    return DONE
  },
}
