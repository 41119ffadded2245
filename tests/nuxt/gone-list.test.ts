import { mockNuxtImport, mountSuspended, registerEndpoint } from '@nuxt/test-utils/runtime'
import { getQuery } from 'h3'
import { afterEach, describe, expect, it, vi } from 'vitest'
import GoneList from '~/components/pieces/GoneList.vue'
import PlaceKeys from '~/components/pieces/PlaceKeys.vue'
import type { SessionWire } from '#shared/schemas/session'
import type { StudioState } from '#shared/schemas/piece-state'
import { studioZone } from '#shared/time'
import type { Role } from '#shared/terms'
import { piecesWords } from '#shared/words/pieces'

const { say } = vi.hoisted(() => ({ say: vi.fn() }))
mockNuxtImport('useTelling', () => () => ({ say, busy: ref(false) }))

const now = Date.parse('2026-04-07T12:00:00Z')
const clock = { now, zone: studioZone('UTC') }
const state = { revision: 1, places: [{ id: 4, name: 'Shelf A', roomId: 1, kind: 'shelf', capacity: 6, taken: 0, sort: 0 }], rooms: [{ id: 1, name: 'Bench' }] } as unknown as StudioState
const piece = (id: number) => ({ id, name: `Bowl ${id}`, version: 3, batch: { id: 1, name: 'Bowls' }, order: null, goneAt: new Date(now).toISOString(), how: 'sold' })
const all = Array.from({ length: 3 }, (_, index) => piece(index + 1))
let answers = true
registerEndpoint('/api/pieces/gone', (event) => {
  if (!answers) throw createError({ statusCode: 500 })
  const { find, after } = getQuery(event)
  const found = all.filter(each => each.name.includes(String(find ?? '')))
  return { pieces: found.slice(Number(after), Number(after) + 2), more: found.length > Number(after) + 2 }
})

const as = (role: Role) => { useState<SessionWire | null>('session').value = { person: null, studio: null, member: { id: 1, role, stepKinds: [] }, studios: [] } }
let opened: { unmount: () => void } | null = null
const open = async (find = '') => {
  opened?.unmount()
  clearNuxtData('gone pieces')
  const list = await mountSuspended(GoneList, { props: { find, state, clock } })
  opened = list
  await vi.waitFor(() => expect(list.find('[role="status"] .wait-line').exists()).toBe(false))
  return list
}
const named = (list: Awaited<ReturnType<typeof open>>) => list.findAll('li a').map(link => link.text())

afterEach(() => {
  answers = true
  say.mockReset()
})

describe('what has left', () => {
  it('comes in pages, the next beneath the last', async () => {
    as('maker')
    const list = await open()
    expect(named(list)).toEqual(['Bowl 1', 'Bowl 2'])
    await list.findAll('button').find(each => each.text() === piecesWords.moreGone)?.trigger('click')
    await vi.waitFor(() => expect(named(list)).toEqual(['Bowl 1', 'Bowl 2', 'Bowl 3']))
    expect(list.text()).not.toContain(piecesWords.moreGone)
  })

  it('comes back to the place that is chosen, as one act about the piece as it stands', async () => {
    as('maker')
    const list = await open()
    await list.get(`button[aria-label="${piecesWords.backOf('Bowl 2')}"]`).trigger('click')
    list.getComponent(PlaceKeys).vm.$emit('choose', 4, 'Shelf A')
    await vi.waitFor(() => expect(say).toHaveBeenCalledOnce())
    expect(say.mock.calls[0]?.[0]).toMatchObject({ kind: 'back', body: { placeId: 4 }, doneAt: now, pieces: [{ id: 2, version: 3 }], detail: { place: 'Shelf A' } })
  })

  it('has no way back for a helper', async () => {
    as('helper')
    expect((await open()).findAll('li button')).toEqual([])
  })

  it('says that nothing has left, and that it could not be fetched', async () => {
    as('maker')
    const none = await open('vase')
    await vi.waitFor(() => expect(none.text()).toContain(piecesWords.noneGone))
    answers = false
    const list = await open()
    await vi.waitFor(() => expect(list.text()).toContain(piecesWords.goneFailed))
  })
})
