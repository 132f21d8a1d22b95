import { readdirSync, readFileSync } from 'node:fs'
import { join, relative, resolve } from 'node:path'
import { describe, expect, it } from 'vitest'
import { brightnessVariables } from '../src/model/diagnostics/brightness.ts'
import { budgetVariables } from '../src/model/diagnostics/budget.ts'
import { sizeVariables } from '../src/model/diagnostics/diagnose.ts'
import { profileVariables } from '../src/model/diagnostics/profileVariables.ts'
import { resolve as resolveScenario } from '../src/model/scenario/resolve.ts'

/** The rules of the house that no compiler checks. */

const root = resolve(import.meta.dirname, '..')

/** Modules from the inside out; those of one row may not import each other. */
const RANKS = [
  ['constants', 'units', 'errors'],
  ['numerics'],
  ['processes', 'optics'],
  ['scenario'],
  ['grid'],
  ['atmosphere'],
  ['state'],
  ['tendency'],
  ['integrate', 'diagnostics'],
  ['simulate'],
  ['instruments', 'retrieval', 'scoring'],
  ['experiments'],
]

function filesBelow(directory: string): string[] {
  return readdirSync(join(root, directory), { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile() && /\.(ts|mjs|mts)$/.test(entry.name))
    .map((entry) => relative(root, join(entry.parentPath, entry.name)))
}

function importsOf(file: string): string[] {
  const text = readFileSync(join(root, file), 'utf8')
  return [...text.matchAll(/(?:from|import\()\s*'([^']+)'/g)].map(([, name]) => name)
}

/** The module of src/model that a file belongs to. */
function moduleOf(file: string): string {
  return file.split('/')[2].replace(/\.ts$/, '')
}

function rankOf(module: string): number {
  return RANKS.findIndex((row) => row.includes(module))
}

function importedFile(file: string, name: string): string {
  return relative(root, resolve(join(root, file), '..', name))
}

const modelFiles = filesBelow('src/model')
const ioFiles = filesBelow('src/io')
const sources = [...modelFiles, ...ioFiles, ...filesBelow('bin')]

describe('the layers', () => {
  it('have a rank for every module of the model', () => {
    expect([...new Set(modelFiles.map(moduleOf))].filter((name) => rankOf(name) < 0)).toEqual([])
  })

  it('let model files import only from modules further in', () => {
    const outward = modelFiles.flatMap((file) =>
      importsOf(file)
        .filter((name) => name.startsWith('.'))
        .map((name) => importedFile(file, name))
        .filter((target) => {
          if (!target.startsWith('src/model/')) return true
          const [from, to] = [moduleOf(file), moduleOf(target)]
          return from !== to && rankOf(to) >= rankOf(from)
        })
        .map((target) => `${file} imports ${target}`),
    )
    expect(outward).toEqual([])
  })

  it('keep files and commands out of the model, and the program out of src/io', () => {
    const wrong = ioFiles.filter((file) =>
      importsOf(file).some((name) => importedFile(file, name).startsWith('bin/')),
    )
    expect(wrong).toEqual([])
  })

  it('keep the file system, the clock, the terminal, threads and global chance out of the model', () => {
    const banned =
      /'node:|\bprocess\.(?:env|cwd|argv|std|exit)|\bconsole\.|\bnew Date\(\)|\bDate\.now|performance\.now|Math\.random|setTimeout|setImmediate/
    const wrong = modelFiles.filter((file) => {
      const code = readFileSync(join(root, file), 'utf8').replaceAll(/\/\*[\s\S]*?\*\/|\/\/.*/g, '')
      return banned.test(code)
    })
    expect(wrong).toEqual([])
  })
})

describe('the files', () => {
  it('stay below 260 lines, tables of numbers apart', () => {
    const long = sources.filter(
      (file) =>
        !file.endsWith('Table.ts') &&
        readFileSync(join(root, file), 'utf8').split('\n').length > 260,
    )
    expect(long).toEqual([])
  })

  it('are named after what they hold', () => {
    const vague = sources.filter((file) =>
      /(^|\/)(utils?|helpers?|manager|data|misc)\b/i.test(file),
    )
    expect(vague).toEqual([])
  })
})

describe('the output variables', () => {
  const { scenario } = resolveScenario({})
  const lists = {
    profiles: profileVariables(scenario),
    brightness: brightnessVariables(),
    budget: budgetVariables(scenario),
    sizes: sizeVariables(scenario),
  }

  it('have names that tools in every language take', () => {
    const names = Object.values(lists)
      .flat()
      .map(({ name }) => name)
    expect(names.filter((name) => !/^[a-z][A-Za-z0-9_]*$/.test(name))).toEqual([])
  })

  it('are named once in their table, and each says what it is', () => {
    for (const list of Object.values(lists)) {
      expect(new Set(list.map(({ name }) => name)).size).toBe(list.length)
      expect(list.filter(({ longName }) => longName === '')).toEqual([])
    }
  })
})
