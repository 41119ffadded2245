import { spawnSync } from 'node:child_process'
import { fileURLToPath } from 'node:url'
import { describe, expect, it } from 'vitest'
import { BadField } from '../../../scripts/model/fields'
import { readRoom } from '../../../scripts/vapour/read-room'
import { runRoom } from '../../../scripts/vapour/run-room'

const root = fileURLToPath(new URL('../../..', import.meta.url))
const coat = { at: '2026-04-06T08:00:00Z', vocGramsPerLitre: 450, carrier: 'solvent', thinnerGrams: 0, coat: 'normal', areaM2: 3, spreadM2PerLitre: 10, touchDryMinutes: 240, solvent: { limitMgM3: 350, ceilingMgM3: 1800, lelGramsM3: 42 } }
const good = { room: { volumeM3: 40, airChangesPerHour: 4, mixingFactor: 3 }, coats: [coat], from: '2026-04-06T08:00:00Z', hours: 24 }
const withCoat = (over: object) => ({ ...good, coats: [{ ...coat, ...over }] })
const withRoom = (over: object) => ({ ...good, room: { ...good.room, ...over } })

function refusal(value: unknown, place = ''): string {
  try {
    readRoom(value, place)
  }
  catch (error) {
    if (error instanceof BadField) return error.message
    throw error
  }
  return 'accepted'
}

describe('a room that cannot be used is refused in one line naming the field', () => {
  it.each<[string, unknown, RegExp]>([
    ['not an object', 7, /^case: expected an object/],
    ['no room', { ...good, room: undefined }, /^room: expected an object/],
    ['no volume', withRoom({ volumeM3: undefined }), /^room\.volumeM3: expected a number/],
    ['a volume of nothing', withRoom({ volumeM3: 0 }), /^room\.volumeM3/],
    ['air that changes backwards', withRoom({ airChangesPerHour: -1 }), /^room\.airChangesPerHour/],
    ['mixing better than perfect', withRoom({ mixingFactor: 0.2 }), /^room\.mixingFactor/],
    ['no coats', { ...good, coats: undefined }, /^coats: expected a list/],
    ['a bad date', withCoat({ at: 'noon' }), /^coats\[0\]\.at: expected an instant/],
    ['NaN, which JSON writes as null', withCoat({ vocGramsPerLitre: Number.NaN }), /^coats\[0\]\.vocGramsPerLitre/],
    ['an unknown carrier', withCoat({ carrier: 'honey' }), /^coats\[0\]\.carrier: expected one of solvent, water, got "honey"/],
    ['a coat that is not a size', withCoat({ coat: 'huge' }), /^coats\[0\]\.coat: expected one of thin/],
    ['a spread of nothing', withCoat({ spreadM2PerLitre: 0 }), /^coats\[0\]\.spreadM2PerLitre/],
    ['an area below nothing', withCoat({ areaM2: -3 }), /^coats\[0\]\.areaM2/],
    ['thinner below nothing', withCoat({ thinnerGrams: -1 }), /^coats\[0\]\.thinnerGrams/],
    ['dry before it is laid', withCoat({ touchDryMinutes: 0 }), /^coats\[0\]\.touchDryMinutes/],
    ['a solvent the table has not', withCoat({ solvent: 'lemonade' }), /^coats\[0\]\.solvent: .*"lemonade"/],
    ['a solvent without its limit', withCoat({ solvent: { lelGramsM3: 42 } }), /^coats\[0\]\.solvent\.limitMgM3/],
    ['a limit of nothing', withCoat({ solvent: { ...coat.solvent, limitMgM3: 0 } }), /^coats\[0\]\.solvent\.limitMgM3/],
    ['a bad start', { ...good, from: 5 }, /^from: expected an instant/],
    ['no hours', { ...good, hours: 0 }, /^hours/],
  ])('%s', (_, value, message) => {
    const line = refusal(value)
    expect(line).toMatch(message)
    expect(line).not.toContain('\n')
  })

  it('says which room of a list', () => {
    expect(refusal(withCoat({ carrier: 'honey' }), '[3]')).toMatch(/^\[3\]\.coats\[0\]\.carrier/)
  })
})

describe('a room that can', () => {
  it('gives what the contract asks', () => {
    const found = runRoom(readRoom(good, ''))
    expect(Object.keys(found)).toEqual(['massGrams', 'peakMgM3', 'peakAt', 'mean8hMgM3', 'lelShare', 'neededM3PerHour', 'notClearBefore', 'band'])
    expect(found).toMatchObject({ massGrams: 135, band: 'strong-exhaust' })
    expect(found.peakAt).toMatch(/^2026-04-06T08:3[34]:/)
    // The worst eight hours begin with the coat: at four changes nothing is left of it after them that was not there before.
    expect(found.mean8hMgM3).toBeCloseTo(104.2, 1)
  })

  it('takes a solvent by its id or its name on the can, and says unknown when nobody knows the air', () => {
    const byId = runRoom(readRoom(withCoat({ solvent: 'mineral-spirits' }), ''))
    expect(runRoom(readRoom(withCoat({ solvent: 'White spirit' }), ''))).toEqual(byId)
    expect(byId.neededM3PerHour).toBeCloseTo(260.4, 1)
    expect(runRoom(readRoom(withRoom({ airChangesPerHour: null }), ''))).toMatchObject({ band: 'unknown', neededM3PerHour: null })
  })

  it('leaves out what may be left out', () => {
    const { thinnerGrams, coat: size, ...less } = coat
    expect([thinnerGrams, size]).toEqual([0, 'normal'])
    expect(runRoom(readRoom({ room: good.room, coats: [less], from: good.from }, ''))).toEqual(runRoom(readRoom(good, '')))
  })
})

describe('the command', () => {
  const run = (args: string[], input = '') => spawnSync('node', ['--import', 'tsx', 'scripts/vapour.ts', ...args], { cwd: root, input, encoding: 'utf8' })

  it('reads standard input, one room or a list', () => {
    const one: unknown = JSON.parse(run(['-'], JSON.stringify(good)).stdout)
    expect(JSON.parse(run(['-'], JSON.stringify([good, good])).stdout)).toEqual([one, one])
  }, 60_000)

  it('ends with 2 and one line for a room that cannot be used', () => {
    const { status, stderr, stdout } = run(['-'], JSON.stringify([good, withRoom({ volumeM3: -1 })]))
    expect([status, stdout]).toEqual([2, ''])
    expect(stderr.trim()).toMatch(/^\[1\]\.room\.volumeM3: expected .*, got -1$/)
  }, 60_000)

  it('explains itself', () => {
    expect(run(['--help'])).toMatchObject({ status: 0, stdout: expect.stringContaining('npm run --silent vapour') })
  }, 60_000)
})
