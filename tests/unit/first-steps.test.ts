import { describe, expect, it } from 'vitest'
import { firstSteps, usualHours } from '#shared/first-steps'
import type { WhatIsThere } from '#shared/first-steps'

const empty: WhatIsThere = { rooms: 0, places: 0, pieces: 0, hours: usualHours, ownMaterials: 0 }
const states = (over: Partial<WhatIsThere>) => Object.fromEntries(firstSteps({ ...empty, ...over }).map(({ key, state }) => [key, state]))

describe('the first steps of a studio', () => {
  it('claim nothing as done that came with the studio', () => {
    expect(states({})).toEqual({ rooms: 'open', places: 'open', hours: 'as it came', materials: 'as it came', batch: 'open' })
  })

  it('are done by what is there, in whatever order it came', () => {
    expect(states({ rooms: 2 })).toMatchObject({ rooms: 'done', places: 'open', batch: 'open' })
    expect(states({ places: 3, pieces: 1 })).toMatchObject({ rooms: 'open', places: 'done', batch: 'done' })
    expect(states({ ownMaterials: 1 })).toMatchObject({ materials: 'done', hours: 'as it came' })
  })

  it('take hours for the studio’s own once they differ from those it was given', () => {
    const saturday = { weekday: 6, fromMin: 540, toMin: 780 }
    expect(states({ hours: [...usualHours, saturday] }).hours).toBe('done')
    expect(states({ hours: usualHours.map(each => ({ ...each, toMin: 960 })) }).hours).toBe('done')
    expect(states({ hours: [...usualHours].reverse() }).hours).toBe('as it came')
    expect(states({ hours: [] }).hours).toBe('open')
  })
})
