import { execFileSync, spawnSync } from 'node:child_process'
import { fileURLToPath } from 'node:url'
import { describe, expect, it } from 'vitest'
import { libraryMaterials } from '#shared/library/index'
import { BadField } from '../../../scripts/model/fields'
import { readCase } from '../../../scripts/model/read-case'
import { runCase } from '../../../scripts/model/run-case'
import { tools } from '../../helpers/drying'

const root = fileURLToPath(new URL('../../..', import.meta.url))
const inline = {
  reference: { tempC: 20, rh: 0.5 }, minTempC: 10, maxRh: 0.85, windows: [[0, 60], [2880, null]],
  milestones: [{ name: 'set-to-touch', driver: 'water', low: 10, typical: 20, high: 40 }, { name: 'dry-to-handle', driver: 'coalescence', low: 60, typical: 90, high: 200 }],
}
const good = { material: inline, appliedAt: '2026-04-06T21:00:00Z', coat: 'normal', ground: 'primed', zone: 'UTC', heated: true, readings: [{ at: '2026-04-06T20:00:00Z', tempC: 20, rh: 0.5 }], now: '2026-04-06T21:10:00Z' }

function refusal(value: unknown, place = ''): string {
  try {
    readCase(value, place)
  }
  catch (error) {
    if (error instanceof BadField) return error.message
    throw error
  }
  return 'accepted'
}

const milestone = (over: object) => ({ ...good, material: { ...inline, milestones: [{ ...inline.milestones[0], ...over }] } })

describe('a case that cannot be used is refused in one line naming the field', () => {
  it.each<[string, unknown, RegExp]>([
    ['not an object', 7, /^case: expected an object/],
    ['no material', { ...good, material: undefined }, /^material: expected an object/],
    ['an unknown starter material', { ...good, material: 'cheese' }, /^material: .*"cheese"/],
    ['no milestones', { ...good, material: { ...inline, milestones: [] } }, /^material\.milestones: expected at least one/],
    ['an unknown driver', milestone({ driver: 'magic' }), /^material\.milestones\[0\]\.driver: expected one of water, joint/],
    ['low over typical', milestone({ low: 30 }), /^material\.milestones\[0\]\.low: expected at most typical/],
    ['high under typical', milestone({ high: 15 }), /^material\.milestones\[0\]\.high/],
    ['NaN, which JSON writes as null', milestone({ typical: Number.NaN }), /^material\.milestones\[0\]\.typical: expected a number/],
    ['a milestone twice', { ...good, material: { ...inline, milestones: [inline.milestones[0], inline.milestones[0]] } }, /^material\.milestones\[1\]\.name/],
    ['a window backwards', { ...good, material: { ...inline, windows: [[60, 30]] } }, /^material\.windows\[0\]\[1\]/],
    ['a window with one end', { ...good, material: { ...inline, windows: [[60]] } }, /^material\.windows\[0\]: expected two ends/],
    ['a reference out of range', { ...good, material: { ...inline, reference: { tempC: 20, rh: 50 } } }, /^material\.reference\.rh/],
    ['a bad date', { ...good, appliedAt: 'yesterday' }, /^appliedAt: expected an instant/],
    ['a 30 February', { ...good, appliedAt: '2026-02-30T10:00:00Z' }, /^appliedAt/],
    ['a date without its offset', { ...good, appliedAt: '2026-02-20T10:00:00' }, /^appliedAt/],
    ['RH in per cent', { ...good, readings: [{ at: good.appliedAt, tempC: 20, rh: 55 }] }, /^readings\[0\]\.rh: expected a number from 0 to 1, got 55/],
    ['NaN air', { ...good, readings: [{ at: good.appliedAt, tempC: Number.NaN, rh: 0.5 }] }, /^readings\[0\]\.tempC/],
    ['a coat that is not a size', { ...good, coat: 'huge' }, /^coat: expected one of thin, normal, full, flood, got "huge"/],
    ['an unknown ground', { ...good, ground: 'jelly' }, /^ground/],
    ['a gale', { ...good, airSpeed: 40 }, /^airSpeed/],
    ['an unknown zone', { ...good, zone: 'Mars/Olympus' }, /^zone/],
    ['a word for yes', { ...good, heated: 'yes' }, /^heated/],
    ['a test of a milestone it has not', { ...good, tests: [{ at: '2026-04-06T22:00:00Z', milestone: 'cured', reached: true }] }, /^tests\[0\]\.milestone/],
    ['a test before the coat', { ...good, tests: [{ at: '2026-04-06T20:00:00Z', milestone: 'set-to-touch', reached: true }] }, /^tests\[0\]\.at/],
    ['a bad earlier coat', { ...good, history: [{ appliedAt: 'once' }] }, /^history\[0\]\.appliedAt/],
    ['a wild speed', { ...good, theta: 'fast' }, /^theta/],
    ['a bad now', { ...good, now: 5 }, /^now/],
  ])('%s', (_, value, message) => {
    const line = refusal(value)
    expect(line).toMatch(message)
    expect(line).not.toContain('\n')
  })

  it('says which case of a list', () => {
    expect(refusal({ ...good, ground: 'jelly' }, '[3]')).toMatch(/^\[3\]\.ground/)
  })
})

describe('a case that can', () => {
  it('gives what the contract asks', () => {
    const result = runCase(readCase({ ...good, tests: [{ at: '2026-04-06T21:15:00Z', milestone: 'set-to-touch', reached: true }] }, ''), tools)
    expect(result.milestones[0]).toEqual({ name: 'set-to-touch', likely: '2026-04-06T21:15:00.000Z', giveTill: '2026-04-06T21:15:00.000Z', reached: '2026-04-06T21:15:00.000Z', reason: null })
    expect(result.milestones[1]).toMatchObject({ reached: null, reason: null })
    expect(result.windows[0]!.opens).toBe('2026-04-06T21:00:00.000Z')
    expect(result.windows[1]!.shuts).toBeNull()
    expect(result).toMatchObject({ state: 'sound', advice: [], speed: { median: 1 } })
  })

  it('takes every starter material by its id', () => {
    for (const { key, milestones } of libraryMaterials) {
      expect(runCase(readCase({ ...good, material: key }, ''), tools).milestones).toHaveLength(milestones.length)
    }
  })

  it('leaves out what may be left out', () => {
    const { milestones, advice } = runCase(readCase({ material: inline, appliedAt: good.appliedAt }, ''), tools)
    expect(milestones[0]!.giveTill).not.toBeNull()
    expect(advice.map(a => a.code)).toEqual(['air-assumed'])
  })
})

describe('the command', () => {
  const command = ['--import', 'tsx', 'scripts/model.ts']
  const run = (args: string[], input = '') => spawnSync('node', [...command, ...args], { cwd: root, input, encoding: 'utf8' })

  it('reads standard input, one case or a list', () => {
    const one: unknown = JSON.parse(execFileSync('node', [...command, '-'], { cwd: root, input: JSON.stringify(good), encoding: 'utf8' }))
    const list: unknown = JSON.parse(execFileSync('node', [...command, '-'], { cwd: root, input: JSON.stringify([good]), encoding: 'utf8' }))
    expect(list).toEqual([one])
  }, 30_000)

  it('ends with 2 and one line for a missing file, for what is not JSON, and for nothing', () => {
    for (const [args, input, line] of [[['nowhere.json'], '', /^nowhere\.json: /], [['-'], '{ "appliedAt": NaN }', /^standard input: expected JSON/], [[], '', /^FILE: /]] as [string[], string, RegExp][]) {
      const { status, stderr, stdout } = run(args, input)
      expect(status).toBe(2)
      expect(stdout).toBe('')
      expect(stderr.trim()).toMatch(line)
      expect(stderr.trim().split('\n')).toHaveLength(1)
    }
  }, 30_000)

  it('explains itself', () => {
    expect(run(['--help'])).toMatchObject({ status: 0, stdout: expect.stringContaining('npm run --silent model') })
  }, 30_000)
})
