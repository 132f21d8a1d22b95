import type { Options, PositionalOptions } from 'yargs'
import { InputError } from '../model/errors.ts'
import type { ModelIdentity } from './modelIdentity.ts'
import type { StopWatch } from './stopSignals.ts'
import type { Terminal } from './terminal.ts'

/** Where a command runs, and what the program that runs it consists of. */
export interface CommandContext {
  terminal: Terminal
  /** The shipped scenarios. */
  scenarioDirectory: string
  /** The compiled file that worker threads run. */
  memberWorker: string
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

/** An option that may be given several times, a word each. */
export function repeatableOption(describe: string, defaultDescription = 'none'): Options {
  const form = { type: 'array', string: true, nargs: 1, default: [] } as const
  return { ...form, defaultDescription, describe: `${describe}; repeatable` }
}

export const setOption = repeatableOption(
  'path=value: override a key of the scenario, such as temperature.offset_K=2',
)

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

export const outOption: Options = {
  type: 'string',
  alias: 'o',
  requiresArg: true,
  describe: 'directory to write; without it the next free one of runs/',
}

export const jobsOption: Options = {
  type: 'string',
  requiresArg: true,
  defaultDescription: 'all cores',
  describe: 'how many runs go on at once',
}

/** Options of every command that runs several scenarios into one directory. */
export const experimentOptions: Record<string, Options> = {
  out: outOption,
  force: {
    type: 'boolean',
    default: false,
    describe: 'replace --out if it is the output of an earlier run',
  },
  jobs: jobsOption,
  json: jsonOption,
  quiet: quietOption,
}

export const scenarioPositional: PositionalOptions = {
  type: 'string',
  describe:
    'a scenario file (YAML or JSON), the run.json of an earlier run, or the name of a shipped scenario',
}

/** A whole number above zero; null where the option was not given. */
export function countArgument(args: CommandArguments, name: string): number | null {
  const text = args[name] as string | undefined
  if (text === undefined) return null
  const count = Number(text)
  if (!Number.isSafeInteger(count) || count < 1)
    throw new InputError(`--${name} ${text}: expected a whole number from 1 on`)
  return count
}

/** What the user chose of the options that experiments have in common. */
export function experimentArguments(args: CommandArguments) {
  return {
    out: (args.out as string | undefined) ?? null,
    force: args.force === true,
    jobs: countArgument(args, 'jobs'),
    json: args.json === true,
    quiet: args.quiet === true,
  }
}
