#!/usr/bin/env node
/**
 * Makes a fresh clone ready to run: installs the packages when they do not match the lock file, compiles when the
 * sources differ from what `dist` was built from. Node built-ins only, because nothing is installed yet. Everything it
 * has to say goes to stderr. `--build` compiles even when nothing has changed.
 */
import { spawnSync } from 'node:child_process'
import { createHash } from 'node:crypto'
import {
  chmodSync,
  existsSync,
  readdirSync,
  readFileSync,
  realpathSync,
  rmSync,
  writeFileSync,
} from 'node:fs'
import { basename, join } from 'node:path'
import { fileURLToPath } from 'node:url'

const STAMP = '.build-stamp'
const BUILD_CONFIGURATION = [
  'package.json',
  'package-lock.json',
  'tsconfig.json',
  'tsconfig.build.json',
]

class SetupError extends Error {}

/** Files below a directory, as sorted paths relative to `root` with forward slashes. */
function filesBelow(root, directory) {
  if (!existsSync(join(root, directory))) return []
  return readdirSync(join(root, directory), { withFileTypes: true })
    .flatMap((entry) => {
      const path = `${directory}/${entry.name}`
      return entry.isDirectory() ? filesBelow(root, path) : [path]
    })
    .sort()
}

/** SHA-256 over names and contents of files, in the given order; hexadecimal. */
function hashFiles(root, paths) {
  const hash = createHash('sha256')
  for (const path of paths) {
    const content = readFileSync(join(root, path))
    hash.update(`${path}\0${content.length}\0`).update(content)
  }
  return hash.digest('hex')
}

/** Hash of all that the compiled program depends on. */
export function sourceHash(root) {
  const sources = [...filesBelow(root, 'bin'), ...filesBelow(root, 'src')].filter((path) =>
    /\.m?ts$|\.mjs$|\.json$/.test(path),
  )
  return hashFiles(root, [...BUILD_CONFIGURATION, ...sources])
}

/** Whether `dist` was built from the sources as they are now. */
export function isBuildFresh(root) {
  const stamp = join(root, 'dist', STAMP)
  return existsSync(stamp) && readFileSync(stamp, 'utf8') === sourceHash(root)
}

function readJson(path) {
  return JSON.parse(readFileSync(path, 'utf8'))
}

/** Whether every package of the lock file, development ones too, is installed in the locked version. */
export function isInstallComplete(root) {
  const installed = join(root, 'node_modules', '.package-lock.json')
  if (!existsSync(installed)) return false
  const present = readJson(installed).packages ?? {}
  const wanted = Object.entries(readJson(join(root, 'package-lock.json')).packages)
  return wanted.every(
    ([path, entry]) =>
      path === '' ||
      entry.optional ||
      entry.devOptional ||
      entry.link ||
      (present[path]?.version === entry.version &&
        present[path]?.integrity === entry.integrity &&
        existsSync(join(root, path, 'package.json'))),
  )
}

function say(text) {
  process.stderr.write(`${text}\n`)
}

/** Runs a program with its output on our stderr; returns whether it succeeded. */
function succeeds(root, command, args, options = {}) {
  const result = spawnSync(command, args, { cwd: root, stdio: ['ignore', 2, 2], ...options })
  if (result.error) throw new SetupError(`${command} could not be started: ${result.error.message}`)
  return result.status === 0
}

function install(root) {
  say('mesofrost: installing packages (once)')
  const args = ['ci', '--include=dev', '--no-audit', '--no-fund']
  const npm = process.env.npm_execpath
  const viaNode = npm !== undefined && basename(npm) === 'npm-cli.js'
  const done = viaNode
    ? succeeds(root, process.execPath, [npm, ...args])
    : succeeds(root, 'npm', args, { shell: process.platform === 'win32' })
  if (!done)
    throw new SetupError('npm ci failed (see above). Check the network, then start this again.')
  if (!isInstallComplete(root))
    throw new SetupError(
      'npm ci left packages of package-lock.json out; delete node_modules and start this again.',
    )
}

function writeIdentity(root) {
  const { name, version, dependencies } = readJson(join(root, 'package.json'))
  const { packages } = readJson(join(root, 'package-lock.json'))
  const libraries = Object.fromEntries(
    Object.keys(dependencies)
      .sort()
      .map((library) => [library, packages[`node_modules/${library}`].version]),
  )
  const model = filesBelow(join(root, 'dist'), 'src/model').filter((path) => path.endsWith('.js'))
  const identity = { name, version, model: hashFiles(join(root, 'dist'), model), libraries }
  writeFileSync(join(root, 'dist', 'identity.json'), `${JSON.stringify(identity, null, 2)}\n`)
}

function build(root) {
  say('mesofrost: compiling')
  rmSync(join(root, 'dist'), { recursive: true, force: true })
  const stamp = sourceHash(root)
  const compiler = join(root, 'node_modules', 'typescript', 'bin', 'tsc')
  const args = [compiler, '--project', 'tsconfig.build.json', '--noEmitOnError']
  if (!succeeds(root, process.execPath, args))
    throw new SetupError('the compiler found errors (see above); nothing was built.')
  writeIdentity(root)
  chmodSync(join(root, 'dist', 'bin', 'mesofrost.js'), 0o755)
  writeFileSync(join(root, 'dist', STAMP), stamp)
}

function setUp(root, force) {
  const [major] = process.versions.node.split('.').map(Number)
  if (major < 20) throw new SetupError(`Node 20 or newer is needed; this is ${process.version}.`)
  if (!isInstallComplete(root)) install(root)
  if (force || !isBuildFresh(root)) build(root)
}

function isStartedDirectly() {
  const started = process.argv[1]
  return started !== undefined && realpathSync(started) === fileURLToPath(import.meta.url)
}

if (isStartedDirectly()) {
  try {
    setUp(fileURLToPath(new URL('..', import.meta.url)), process.argv.includes('--build'))
  } catch (error) {
    if (!(error instanceof SetupError)) throw error
    say(`mesofrost: set-up failed: ${error.message}`)
    process.exitCode = 1
  }
}
