import { eq } from 'drizzle-orm'
import { describe, expect, it } from 'vitest'
import { materialVersion, pieceStep } from '~~/db/schema'
import type { ActRequest } from '#shared/schemas/act'
import { namesLeaf } from '#shared/words/leaf'
import type { Work } from '../../../helpers/advice-work'
import { atWork, coated, now } from '../../../helpers/advice-work'
import { hour, minute } from '../../../helpers/studio'

const moving: ActRequest['body'] = { kind: 'moving', minutes: null }

/** A frame of which only some steps are left, in good air. */
function frame(s: Work, kept: string[], at = now): number[] {
  s.read(20, 0.5, at - hour)
  const ids = s.start('water-gilded-frame', at)
  s.leaveAllBut('water-gilded-frame', ids, kept, at)
  return ids
}

/**
 * A frame whose slow oil size went on 11 hours ago, in air that was read all along. A thin coat of it may be leafed from 600 x 0.7 = 420 min to 1,440 x 0.7 = 1,008 min
 * by its sheet; with the doubt of either end, from about 10 h to about 12 h. A fan is not told of beside a solvent film: it has run, or not, since before.
 */
function sized(s: Work, air: ActRequest['body'] | null) {
  const sizedAt = now - 11 * hour
  const ids = frame(s, ['oil-size', 'leaf-sides'], sizedAt - hour)
  for (const hours of [0, 2, 4, 6, 8, 10]) s.read(20, 0.5, sizedAt + hours * hour)
  if (air) s.tell('air', ids, air, sizedAt - hour)
  s.tell('coat on', ids, { step: 'oil-size' }, sizedAt)
}

describe('still air for leaf', () => {
  it('is asked for where leaf goes on oil size at its tack, if somebody said that the air moves', () => {
    const still = atWork()
    sized(still, null)
    expect(still.line('still-air')).toBeUndefined()
    const blown = atWork()
    sized(blown, moving)
    expect(blown.line('still-air')?.turnIds).toHaveLength(1)
  })

  it('is asked for where leaf goes on wetted bole, which no film is waited for', () => {
    const s = atWork()
    s.tell('air', frame(s, ['lay-leaf']), moving)
    expect(s.line('still-air')?.text).toBe('Somebody said that the air moves here: leaf wants it still.')
  })

  it('is asked for when the fan blows on another piece of the room, and not on one of another room', () => {
    const near = atWork()
    frame(near, ['lay-leaf'])
    near.tell('air', coated(near, 'craft-acrylic'), moving)
    expect(near.line('still-air')?.turnIds).toHaveLength(1)
    const far = atWork()
    frame(far, ['lay-leaf'])
    const elsewhere = coated(far, 'craft-acrylic')
    far.tell('moved', elsewhere, { placeId: far.places.booth })
    far.tell('air', elsewhere, moving)
    expect(far.line('still-air')).toBeUndefined()
  })

  it('is asked for as long as the fan was said to run', () => {
    const s = atWork()
    s.tell('air', frame(s, ['lay-leaf']), { kind: 'moving', minutes: 30 })
    expect(s.line('still-air', now + 29 * minute)).toBeDefined()
    expect(s.line('still-air', now + 31 * minute)).toBeUndefined()
  })

  it('is asked for of what a size at its tack takes, and not of what a glue at its tack joins', () => {
    // The name of the step says nothing of leaf: only what it waits for does.
    const named = (s: Work) => s.db.update(pieceStep).set({ name: 'Press it on' }).where(eq(pieceStep.key, 'leaf-sides')).run()
    const size = atWork()
    sized(size, moving)
    named(size)
    expect(size.line('still-air')?.turnIds).toHaveLength(1)
    const glue = atWork()
    sized(glue, moving)
    named(glue)
    glue.db.update(materialVersion).set({ kind: 'glue' }).where(eq(materialVersion.kind, 'size')).run()
    expect(glue.line('still-air')).toBeUndefined()
  })

  it('is not asked for before the size is on, nor at other bench work', () => {
    const s = atWork()
    s.tell('air', frame(s, ['oil-size', 'leaf-sides']), moving)
    expect(s.line('still-air')).toBeUndefined()
    const other = atWork()
    other.tell('air', frame(other, ['burnish']), moving)
    expect(other.line('still-air')).toBeUndefined()
  })

  it('knows leaf by the name of its step, and a table\'s leaf from gold', () => {
    expect(['Lay leaf on the sides, air still', 'Gild the rim', 'Leafing', 'Laying the silver leaf'].map(namesLeaf)).toEqual([true, true, true, true])
    expect(['Sand the leaf of the table', 'Burnish', 'Fit plates and cord', 'Turn over a new leaf'].map(namesLeaf)).toEqual([false, false, false, false])
  })
})
