import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, beforeEach } from 'vitest'
import { type LoadedScenario, loadScenario } from '../../../src/io/scenario/loadScenario.ts'

const created: string[] = []

/** A fresh directory for every test, and the loader working in it. */
export function scenarioFiles() {
  let directory = ''
  beforeEach(() => {
    directory = mkdtempSync(join(tmpdir(), 'scenario-'))
    created.push(directory)
  })
  afterAll(() => {
    for (const path of created.splice(0)) rmSync(path, { recursive: true })
  })
  const load = (name: string, ...set: string[]): LoadedScenario =>
    loadScenario(name, {
      set,
      shippedDirectory: join(directory, 'shipped'),
      workingDirectory: directory,
    })
  return {
    path: (name: string) => join(directory, name),
    write: (name: string, content: string | Uint8Array) =>
      writeFileSync(join(directory, name), content),
    load,
    refusal(name: string, ...set: string[]): string {
      try {
        load(name, ...set)
      } catch (error) {
        const { name: kind, message } = error as Error
        return kind === 'InputError' ? message : `${kind}: ${message}`
      }
      throw new Error('nothing was refused')
    },
  }
}
