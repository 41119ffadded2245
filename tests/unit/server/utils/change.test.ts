import { afterEach, describe, expect, it, vi } from 'vitest'
import { room, studio } from '~~/db/schema'
import { announce, onChange } from '~~/server/utils/bus'
import { change } from '~~/server/utils/change'
import { prepareDatabase } from '~~/server/utils/database'
import { conflict } from '~~/server/utils/errors'

const open = () => {
  const db = prepareDatabase(':memory:', 'db/migrations', '', 0)
  db.insert(studio).values({ name: 'Fir Lane', zone: 'Europe/London', madeAt: 0 }).run()
  return db
}
const newRoom = { studioId: 1, name: 'Back room', heated: true, nightDropC: 4 }
const listener = vi.fn()
let stop = onChange(listener)
afterEach(() => {
  listener.mockClear()
  stop()
  stop = onChange(listener)
})

describe('change', () => {
  it('raises the revision by one and says so afterwards', () => {
    const db = open()
    expect(change(db, 1, 'places', tx => tx.insert(room).values(newRoom).returning().get().name)).toBe('Back room')
    expect(db.select({ revision: studio.revision }).from(studio).get()).toEqual({ revision: 2 })
    expect(listener.mock.calls).toEqual([[{ studioId: 1, revision: 2, kind: 'places' }]])
  })
  it('takes everything back when the work ends in a refusal', () => {
    const db = open()
    const refused = change(db, 1, 'places', (tx) => {
      tx.insert(room).values(newRoom).run()
      return conflict('Somebody was first.')
    })
    expect(refused).toEqual(conflict('Somebody was first.'))
    expect(db.select().from(room).all()).toEqual([])
    expect(listener).not.toHaveBeenCalled()
  })
  it('announces nothing when the work throws', () => {
    const db = open()
    expect(() => change(db, 1, 'places', () => { throw new Error('no') })).toThrow('no')
    expect(listener).not.toHaveBeenCalled()
  })
})

describe('announce', () => {
  it('goes on to the next listener when one fails', () => {
    const complain = vi.spyOn(console, 'error').mockImplementation(() => undefined)
    const stopFailing = onChange(() => { throw new Error('broken') })
    const after = vi.fn()
    const stopAfter = onChange(after)
    announce({ studioId: 1, revision: 3, kind: 'work' })
    expect(after).toHaveBeenCalledOnce()
    expect(complain).toHaveBeenCalledOnce()
    stopFailing()
    stopAfter()
    complain.mockRestore()
  })
})
