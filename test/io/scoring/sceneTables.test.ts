import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import {
  Dictionary,
  Float64,
  Int32,
  Table,
  tableFromArrays,
  tableToIPC,
  Utf8,
  vectorFromArray,
} from 'apache-arrow'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { commonQuantities } from '../../../src/io/scoring/commonQuantities.ts'
import { csvSceneTable } from '../../../src/io/scoring/csvSceneTable.ts'
import { parseBins, parseSeed, parseThresholds } from '../../../src/io/scoring/quantityOptions.ts'
import { readSceneTable } from '../../../src/io/scoring/readSceneTable.ts'
import { numbersOf, quantityNames, sceneIds } from '../../../src/io/scoring/sceneTable.ts'
import { InputError } from '../../../src/model/errors.ts'

let place: string
beforeAll(() => {
  place = mkdtempSync(join(tmpdir(), 'mesofrost scenes-'))
})
afterAll(() => rmSync(place, { recursive: true }))

function csv(...lines: string[]) {
  return csvSceneTable(lines.join('\n'), 'mine.csv')
}

describe('a table of scenes in CSV', () => {
  it('may have comments, empty lines, quotes, and gaps where there is no value', () => {
    const table = csv(
      '# mine',
      'scene_id, "ice_ug" ,flag',
      '"a, first",1.5,good',
      '',
      '"b ""2""",,bad',
      'c,NaN,',
    )
    expect(sceneIds(table)).toEqual(['a, first', 'b "2"', 'c'])
    expect([...numbersOf(table, 'ice_ug')]).toEqual([1.5, Number.NaN, Number.NaN])
    expect(quantityNames(table)).toEqual(['ice_ug'])
  })

  it.each([
    [['scene_id,a', 'x,1,2'], 'mine.csv:2: 3 fields; allowed: 2, as in the header'],
    [['scene_id,a', 'x,1', '', 'y'], 'mine.csv:4: 1 fields; allowed: 2, as in the header'],
    [['scene_id,a'], 'mine.csv: no rows; allowed: a header line and one line per scene'],
    [['# nothing'], 'mine.csv: no rows; allowed: a header line and one line per scene'],
    [['scene_id,a,a', 'x,1,2'], 'mine.csv:1: column a stands there twice'],
  ])('is refused as %j', (lines, message) => {
    expect(() => csv(...lines)).toThrow(new InputError(message))
  })

  it('needs the names of its scenes, and suggests what was meant', () => {
    expect(() => sceneIds(csv('# mine', 'scene_ids,a', 'x,1'))).toThrow(
      new InputError(
        'mine.csv:2: no column scene_id; columns there: scene_ids, a; did you mean scene_ids?',
      ),
    )
    expect(() => sceneIds(csv('scene_id,a', 'x,1', ',2'))).toThrow(
      new InputError('mine.csv:3: column scene_id is empty'),
    )
  })

  it('refuses what is no number, and an uncertainty below zero', () => {
    const table = csv('scene_id,a,a_uncertainty', 'x,1,0.1', 'y,high,-1')
    expect(() => numbersOf(table, 'a')).toThrow(
      new InputError(
        'mine.csv:3: column a: "high" is not allowed; allowed: a number, or nothing where there is none',
      ),
    )
    expect(() => numbersOf(table, 'a_uncertainty', 0)).toThrow(
      'allowed: a number from 0 on, or nothing where there is none',
    )
  })
})

describe('a table of scenes in Arrow', () => {
  const table = () =>
    tableFromArrays({
      scene_id: BigInt64Array.of(7n, 8n),
      small: Float32Array.of(0.5, 0.25),
      whole: Int32Array.of(3, 4),
    })

  it.each(['file', 'stream'] as const)('is read as a %s, with numbers of any width', (form) => {
    writeFileSync(join(place, 'numbers.arrow'), tableToIPC(table(), form))
    const read = readSceneTable('numbers.arrow', 'estimates', place)
    expect(sceneIds(read)).toEqual(['7', '8'])
    expect([...numbersOf(read, 'small')]).toEqual([0.5, 0.25])
    expect([...numbersOf(read, 'whole')]).toEqual([3, 4])
  })

  it('is read with texts as a dictionary and with nulls', () => {
    const scene_id = vectorFromArray(['a', 'b', 'a'], new Dictionary(new Utf8(), new Int32()))
    const value = vectorFromArray([1, null, 3], new Float64())
    writeFileSync(join(place, 'words.arrow'), tableToIPC(new Table({ scene_id, value }), 'file'))
    const read = readSceneTable('words.arrow', 'estimates', place)
    expect(sceneIds(read)).toEqual(['a', 'b', 'a'])
    expect([...numbersOf(read, 'value')]).toEqual([1, Number.NaN, 3])
  })

  it('is refused when it is cut off, and so is what is neither Arrow nor text', () => {
    const bytes = tableToIPC(table(), 'file')
    writeFileSync(join(place, 'cut.arrow'), bytes.subarray(0, bytes.length - 20))
    expect(() => readSceneTable('cut.arrow', 'estimates', place)).toThrow(
      new InputError('cut.arrow is cut off, so it cannot be read'),
    )
    writeFileSync(join(place, 'picture'), Buffer.of(1, 0, 2))
    expect(() => readSceneTable('picture', 'estimates', place)).toThrow(
      new InputError('estimates picture is binary; allowed: an Arrow table or CSV text'),
    )
    expect(() => readSceneTable('absent.csv', 'truth', place)).toThrow(
      new InputError('truth absent.csv does not exist'),
    )
  })
})

describe('the quantities of two tables', () => {
  const truth = csv('scene_id,time_h,ice_ug,radius_nm', 'x,1,2,3')

  it('are those that both have, coordinates apart', () => {
    const estimates = csv('scene_id,time_h,radius_nm,ice_ugg,ice_ug_uncertainty', 'x,1,2,3,4')
    expect(commonQuantities(estimates, truth)).toEqual({
      scored: ['radius_nm'],
      unscored: [
        { name: 'ice_ugg', nearest: 'ice_ug' },
        { name: 'ice_ug_uncertainty', nearest: null },
      ],
    })
  })

  it('must be one at least', () => {
    expect(() => commonQuantities(csv('scene_id,albedo', 'x,1'), truth)).toThrow(
      new InputError(
        'mine.csv and mine.csv have no quantity in common; estimated: albedo; true: ice_ug, radius_nm',
      ),
    )
  })
})

describe('options by quantity', () => {
  it('are read', () => {
    expect([...parseThresholds(['a_K=-1.5e2', 'b=0'])]).toEqual([
      ['a_K', -150],
      ['b', 0],
    ])
    expect([...parseBins(['a=1, 2,30'])]).toEqual([['a', [1, 2, 30]]])
    expect(parseSeed('4294967295')).toBe(4294967295)
  })

  it.each(['a', 'a=', '=3', 'a=x', 'a=1,2'])('refuse the threshold %s', (text) => {
    expect(() => parseThresholds([text])).toThrow(
      new InputError(
        `--threshold ${text}: expected QUANTITY=VALUE, such as column_ice_ug_per_m2=20`,
      ),
    )
  })

  it.each(['a=', 'a=2,1', 'a=1,1', 'a=1,,2', 'a=1,x'])('refuse the bins %s', (text) => {
    expect(() => parseBins([text])).toThrow(`--bins ${text}: expected QUANTITY=A,B,C`)
  })

  it('refuse a quantity given twice, and a seed out of range', () => {
    expect(() => parseThresholds(['a=1', 'a=2'])).toThrow(
      '--threshold a=2: a was given more than once',
    )
    for (const seed of ['-1', '1.5', 'x', '', '4294967296'])
      expect(() => parseSeed(seed)).toThrow(
        `--seed ${seed}: expected a whole number from 0 to 4294967295`,
      )
  })
})
