import type { Options, PositionalOptions } from 'yargs'
import type { ModelIdentity } from './modelIdentity.ts'
import type { StopWatch } from './stopSignals.ts'
import type { Terminal } from './terminal.ts'

/** Where a command runs, and what the program that runs it consists of. */
export interface CommandContext {
  terminal: Terminal
  /** The shipped scenarios. */
  scenarioDirectory: string
  identity: ModelIdentity
  watchStopSignals(): StopWatch
}

/** What yargs made of the command line: by name of option or positional. */
export type CommandArguments = Record<string, unknown>

/** One command of the program. */
export interface Command {
  name: string
  /** Positionals as yargs writes them: <needed> [optional]. */
  usage: string
  describe: string
  positionals: Record<string, PositionalOptions>
  options: Record<string, Options>
  /** Command lines with what they do. */
  examples: [line: string, meaning: string][]
  /** Does the work and returns the exit code. */
  run(args: CommandArguments, context: CommandContext): Promise<number>
}

export const setOption: Options = {
  type: 'array',
  string: true,
  nargs: 1,
  default: [],
  defaultDescription: 'none',
  describe:
    'path=value: override a key of the scenario, such as temperature.offset_K=2; repeatable',
}

export const jsonOption: Options = {
  type: 'boolean',
  alias: 'j',
  default: false,
  describe: 'print the result as one JSON object',
}

export const quietOption: Options = {
  type: 'boolean',
  alias: 'q',
  default: false,
  describe: 'no progress, notices or warnings',
}

export const scenarioPositional: PositionalOptions = {
  type: 'string',
  describe:
    'a scenario file (YAML or JSON), the run.json of an earlier run, or the name of a shipped scenario',
}
