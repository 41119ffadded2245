import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { ScheduleConflictWire, ScheduleDetailWire, ScheduleDraftWire, ScheduleMaterialsWire, ScheduleVersionWire, ScheduleWire } from '#shared/schemas/schedule'
import type { Wire } from '#shared/schemas/wire'
import { changeStep } from '#shared/schedules/edit'
import { startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { firstStudio, joinAs } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'

let server: TestServer
let owner: Visitor
let maker: Visitor
let helper: Visitor
let box: ScheduleWire

interface Refused { data: { reason: string, message: string, fields?: Record<string, string>, current?: unknown } }
const draftOf = async (who: Visitor, id: number) => (await who.get<ScheduleDraftWire>(`/api/schedules/${id}/draft`)).body

beforeAll(async () => {
  server = await startServer()
  owner = await firstStudio(server.origin)
  maker = await joinAs(server.origin, owner, 'maker', 'moss@example.test')
  helper = await joinAs(server.origin, owner, 'helper', 'hazel@example.test')
  const list = (await maker.get<ScheduleWire[]>('/api/schedules')).body
  box = list.find(each => each.libraryKey === 'painted-waxed-box')!
})
afterAll(() => server.stop())

describe('finishing schedules over HTTP', () => {
  it('are read by helpers and changed by makers only', async () => {
    expect((await helper.get(`/api/schedules/${box.id}`)).status).toBe(200)
    expect((await helper.get(`/api/schedules/${box.id}/versions`)).status).toBe(200)
    expect((await helper.get(`/api/schedules/${box.id}/draft`)).status).toBe(403)
    const { no, draft } = await draftOf(maker, box.id)
    expect((await helper.put(`/api/schedules/${box.id}`, { baseNo: no, draft })).status).toBe(403)
  })

  it('take a new edition, and tell a second editor what stands there now', async () => {
    const { materials } = (await maker.get<ScheduleMaterialsWire>('/api/schedules/materials')).body
    const sheets = new Map(materials.map(each => [each.id, each]))
    const both = await draftOf(maker, box.id)
    const key = both.draft.steps[0]!.key
    const saved = await maker.put(`/api/schedules/${box.id}`, { baseNo: both.no, draft: changeStep(both.draft, key, { pieceMin: 44 }, sheets) })
    expect(saved).toMatchObject({ status: 200, body: { id: box.id, no: both.no + 1 } })
    const late = await owner.put<Refused>(`/api/schedules/${box.id}`, { baseNo: both.no, draft: changeStep(both.draft, key, { pieceMin: 45 }, sheets) })
    expect(late.status).toBe(409)
    const current = late.body.data.current as ScheduleConflictWire
    expect(current).toMatchObject({ no: both.no + 1, by: 'moss' })
    expect(current.draft.steps[0]?.pieceMin).toBe(44)
    const versions = (await helper.get<Wire<ScheduleVersionWire[]>>(`/api/schedules/${box.id}/versions`)).body
    expect(versions.map(each => each.no)).toEqual([both.no + 1, both.no])
    expect(versions[0]?.changes).toEqual([{ code: 'step changed', of: both.draft.steps[0]!.name, was: both.draft.steps[0]!.name, fields: ['minutes'] }])
    expect((await maker.get<ScheduleDetailWire>(`/api/schedules/${box.id}`)).body.pieceMin).toBe(box.pieceMin + 44 - both.draft.steps[0]!.pieceMin)
  })

  it('name the step that cannot be (422) and the field that cannot be read (400)', async () => {
    const { no, draft } = await draftOf(maker, box.id)
    const [first] = draft.steps
    const circle = { ...draft, links: [...draft.links, { from: draft.steps.at(-1)!.key, to: first!.key, milestone: null, risk: 'p90', windowed: false }] }
    const refused = await maker.put<Refused>(`/api/schedules/${box.id}`, { baseNo: no, draft: circle })
    expect(refused.status).toBe(422)
    expect(refused.body.data.message).toContain('wait for each other in a circle')
    const malformed = await maker.put<Refused>(`/api/schedules/${box.id}`, { baseNo: no, draft: { ...draft, steps: [{ ...first, perDay: 0 }] } })
    expect(malformed).toMatchObject({ status: 400, body: { data: { fields: { 'draft.steps.0.perDay': 'Coats a day are a whole number from 1 to 24.' } } } })
    expect((await draftOf(maker, box.id)).no).toBe(no)
  })

  it('can be made anew, put away and taken out', async () => {
    const { draft } = await draftOf(maker, box.id)
    const made = await maker.post<{ id: number }>('/api/schedules', { draft: { ...draft, name: 'Our box' } })
    expect(made.status).toBe(200)
    expect((await maker.patch(`/api/schedules/${made.body.id}`, { archived: true })).status).toBe(200)
    expect((await maker.get<{ name: string }[]>('/api/schedules/put-away')).body).toEqual([{ id: made.body.id, name: 'Our box' }])
    expect((await maker.get(`/api/schedules/${made.body.id}`)).status).toBe(404)
    expect((await maker.patch(`/api/schedules/${made.body.id}`, { archived: false })).status).toBe(200)
    expect((await maker.get(`/api/schedules/${made.body.id}`)).status).toBe(200)
  })
})
