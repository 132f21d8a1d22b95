import yargs, { type Argv } from 'yargs'
import { InputError } from '../model/errors.ts'
import { nearestWord } from '../model/scenario/nearestWord.ts'
import type { Command, CommandArguments, CommandContext } from './command.ts'
import { checkCommand } from './commands/check.ts'
import { compareCommand } from './commands/compare.ts'
import { convergeCommand } from './commands/converge.ts'
import { perturbCommand } from './commands/perturb.ts'
import { responseMapCommand } from './commands/responseMap.ts'
import { runCommand } from './commands/run.ts'
import { scenariosCommand } from './commands/scenarios.ts'
import { schemaCommand } from './commands/schema.ts'
import { scoreCommand } from './commands/score.ts'
import { showCommand } from './commands/show.ts'
import { sweepCommand } from './commands/sweep.ts'
import { sweepGatherCommand } from './commands/sweepGather.ts'
import { variablesCommand } from './commands/variables.ts'
import { BAD_INPUT, DONE, EXIT_CODES, FAILED } from './exitCodes.ts'
import { print, warn } from './terminal.ts'

const COMMANDS: Command[] = [
  runCommand,
  perturbCommand,
  compareCommand,
  responseMapCommand,
  sweepCommand,
  sweepGatherCommand,
  convergeCommand,
  scoreCommand,
  checkCommand,
  scenariosCommand,
  showCommand,
  variablesCommand,
  schemaCommand,
]
const COMMON_OPTIONS = ['help', 'version']
const HELP_WIDTH = 96

interface Choice {
  command: Command
  args: CommandArguments
}

/** Each command line on a line of its own, so that it can be copied. */
function examplesText({ examples }: Command): string {
  const lines = examples.map(([line, meaning]) => `  ${line}\n      ${meaning}\n`)
  return `Examples:\n${lines.join('')}`
}

function describeCommand(argv: Argv, command: Command): Argv {
  for (const [name, options] of Object.entries(command.positionals)) argv.positional(name, options)
  return argv.options(command.options).epilogue(`${examplesText(command)}\n${EXIT_CODES}`)
}

function suggestion(word: string, known: readonly string[], mark: string): string {
  const nearest = nearestWord(word, known)
  return nearest === null ? '' : `; did you mean ${mark}${nearest}?`
}

/** The first word that names a command; a later one may be the name of a directory. */
function commandOf(words: string[]): Command | undefined {
  const name = words.find((word) => COMMANDS.some((command) => command.name === word))
  return COMMANDS.find((command) => command.name === name)
}

/** yargs names only the unknown word; whether it was an option or a command shows in the command line. */
function unknownWord(word: string, words: string[]): InputError {
  const command = commandOf(words)
  const isOption = words.some(
    (given) => given.startsWith('-') && given.replace(/^-+/, '').split('=')[0] === word,
  )
  if (isOption || (word.length === 1 && !words.includes(word))) {
    const known = [...Object.keys(command?.options ?? {}), ...COMMON_OPTIONS]
    const mark = word.length === 1 ? '-' : '--'
    return new InputError(`unknown option ${mark}${word}${suggestion(word, known, '--')}`)
  }
  if (command !== undefined)
    return new InputError(`'${word}' is one word too many for mesofrost ${command.name}`)
  const names = COMMANDS.map(({ name }) => name)
  return new InputError(`unknown command '${word}'${suggestion(word, names, '')}`)
}

function usageError(message: string, words: string[]): InputError {
  const unknown = /^Unknown (?:argument|command)s?: ([^,]+)/.exec(message)
  if (unknown !== null) return unknownWord(unknown[1], words)
  const hungry = /^Not enough arguments following: (\w+)/.exec(message)
  if (hungry !== null) return new InputError(`--${hungry[1]} needs a value`)
  const command = commandOf(words)
  if (message.startsWith('Not enough non-option arguments') && command !== undefined)
    return new InputError(
      `mesofrost ${command.name} needs ${command.usage}; mesofrost ${command.name} --help tells more`,
    )
  const [first] = message.split('\n')
  return new InputError(`${first.charAt(0).toLowerCase()}${first.slice(1)}`)
}

/** Repeats are kept by the parser for the sake of --set; elsewhere they are a slip. */
function refuseRepeats({ command, args }: Choice): void {
  for (const [name, options] of Object.entries(command.options))
    if (options.type !== 'array' && Array.isArray(args[name]))
      throw new InputError(`--${name} was given more than once`)
}

function makeParser(words: string[], version: string, choose: (choice: Choice) => void): Argv {
  const parser = yargs()
    .scriptName('mesofrost')
    .usage('$0 <command>\n\nA column laboratory for noctilucent clouds.')
    .parserConfiguration({
      'greedy-arrays': false,
      'dot-notation': false,
      'parse-numbers': false,
      'camel-case-expansion': false,
    })
    .locale('en')
    .wrap(HELP_WIDTH)
    .exitProcess(false)
    .strict()
    .version(version)
    .epilogue(EXIT_CODES)
    .fail((message, error) => {
      throw message ? usageError(message, words) : error
    })
  for (const command of COMMANDS)
    parser.command(
      `${command.name} ${command.usage}`.trim(),
      command.describe,
      (argv) => describeCommand(argv, command),
      (args) => choose({ command, args }),
    )
  return parser
}

/** The command that the words choose, or the text that answers them (help, version). */
async function parse(words: string[], version: string): Promise<Choice | string> {
  const choices: Choice[] = []
  const parser = makeParser(words, version, (choice) => choices.push(choice))
  const text = await new Promise<string>((resolve, reject) => {
    parser.parseAsync(words, {}, (_error, _args, output) => resolve(output)).catch(reject)
  })
  if (choices.length === 0) return `${text}\n`
  refuseRepeats(choices[0])
  return choices[0]
}

function reportError(error: unknown, { terminal }: CommandContext): number {
  if (error instanceof InputError) {
    warn(terminal, error.message)
    return BAD_INPUT
  }
  const message = error instanceof Error ? error.message : String(error)
  warn(terminal, `unexpected error: ${message}`)
  if (process.env.MESOFROST_DEBUG === '1' && error instanceof Error)
    terminal.stderr.write(`${error.stack}\n`)
  return FAILED
}

/** Does what the words of a command line ask for and returns the exit code. */
export async function commandLine(words: string[], context: CommandContext): Promise<number> {
  try {
    const asked = words.length === 0 ? ['--help'] : words
    const choice = await parse(asked, context.identity.version)
    if (typeof choice !== 'string') return await choice.command.run(choice.args, context)
    if (words.length === 0) {
      context.terminal.stderr.write(choice)
      return BAD_INPUT
    }
    await print(context.terminal, choice)
    return DONE
  } catch (error) {
    return reportError(error, context)
  }
}
