import { cpSync, mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { isBuildFresh, isInstallComplete, sourceHash } from '../../bin/setup.mjs'

let root: string
beforeEach(() => {
  root = mkdtempSync(join(tmpdir(), 'mesofrost set up-'))
  for (const file of ['package.json', 'tsconfig.json', 'tsconfig.build.json'])
    writeFileSync(join(root, file), '{}')
  mkdirSync(join(root, 'src', 'model'), { recursive: true })
  writeFileSync(join(root, 'src', 'model', 'ice.ts'), 'export const density = 932\n')
  lock({ 'node_modules/odex': { version: '3.0.0', integrity: 'sha512-a' } })
})
afterEach(() => rmSync(root, { recursive: true }))

type Packages = Record<string, Record<string, unknown>>

function lock(packages: Packages): void {
  writeFileSync(
    join(root, 'package-lock.json'),
    JSON.stringify({ packages: { '': { name: 'mesofrost' }, ...packages } }),
  )
}

function installed(packages: Packages): void {
  for (const path of Object.keys(packages)) {
    mkdirSync(join(root, path), { recursive: true })
    writeFileSync(join(root, path, 'package.json'), '{}')
  }
  mkdirSync(join(root, 'node_modules'), { recursive: true })
  writeFileSync(join(root, 'node_modules', '.package-lock.json'), JSON.stringify({ packages }))
}

function markBuilt(): void {
  mkdirSync(join(root, 'dist'), { recursive: true })
  writeFileSync(join(root, 'dist', '.build-stamp'), sourceHash(root))
}

describe('isBuildFresh', () => {
  it('holds until a source, the configuration or the lock file changes', () => {
    const changes = [
      () => writeFileSync(join(root, 'src', 'model', 'ice.ts'), 'export const density = 933\n'),
      () => writeFileSync(join(root, 'src', 'model', 'snow.ts'), ''),
      () => rmSync(join(root, 'src', 'model', 'snow.ts')),
      () => writeFileSync(join(root, 'tsconfig.json'), '{"compilerOptions":{}}'),
      () => lock({ 'node_modules/odex': { version: '3.0.1', integrity: 'sha512-b' } }),
    ]
    for (const change of changes) {
      markBuilt()
      expect(isBuildFresh(root)).toBe(true)
      change()
      expect(isBuildFresh(root)).toBe(false)
    }
  })

  it('goes by content, not by the age of files', () => {
    markBuilt()
    cpSync(join(root, 'src'), join(root, 'copy'), { recursive: true })
    rmSync(join(root, 'src'), { recursive: true })
    cpSync(join(root, 'copy'), join(root, 'src'), { recursive: true })
    expect(isBuildFresh(root)).toBe(true)
  })

  it('fails without a build', () => {
    expect(isBuildFresh(root)).toBe(false)
  })
})

describe('isInstallComplete', () => {
  it('wants every package of the lock file in its version', () => {
    expect(isInstallComplete(root)).toBe(false)
    installed({ 'node_modules/odex': { version: '2.0.4', integrity: 'sha512-c' } })
    expect(isInstallComplete(root)).toBe(false)
    installed({ 'node_modules/odex': { version: '3.0.0', integrity: 'sha512-a' } })
    expect(isInstallComplete(root)).toBe(true)
  })

  it('notices a package that was deleted by hand', () => {
    installed({ 'node_modules/odex': { version: '3.0.0', integrity: 'sha512-a' } })
    rmSync(join(root, 'node_modules', 'odex'), { recursive: true })
    expect(isInstallComplete(root)).toBe(false)
  })

  it('does not miss packages made for other machines', () => {
    lock({ 'node_modules/native-other': { version: '1.0.0', optional: true } })
    installed({})
    expect(isInstallComplete(root)).toBe(true)
  })
})
