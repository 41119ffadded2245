import { mountSuspended } from '@nuxt/test-utils/runtime'
import { describe, expect, it } from 'vitest'
import PieceSteps from '~/components/piece/PieceSteps.vue'
import type { StepLine } from '#shared/schemas/piece-detail'
import { studioZone } from '#shared/time'

const now = Date.parse('2026-04-07T12:00:00Z')
const hour = 3_600_000
const clock = { now, zone: studioZone('UTC') }
const step = (id: number, over: Partial<StepLine>): StepLine => ({ id, key: `step-${id}`, name: `Step ${id}`, kind: 'coat', origin: 'schedule', status: 'waiting', asideReason: null, material: null, parts: [], waitsFor: [], turnsDone: 0, turnsOf: 1, doneAt: null, plannedAt: null, film: null, because: null, ...over })
const rows = async (steps: StepLine[]) => (await mountSuspended(PieceSteps, { props: { steps, read: null, state: null, clock } })).findAll('li')

describe('the steps of a piece', () => {
  it('say of a recovery that it was put in, when, by whom and why', async () => {
    const [row] = await rows([step(1, { name: 'Scuff between coats', kind: 'light sanding', origin: 'recovery', because: { kind: 'coat on', doneAt: now - 2 * hour, by: 'Bertel' } })])
    expect(row?.text()).toContain('Scuff between coats')
    expect(row?.text()).toContain('Recovery, put in 10:00, Bertel: the window shut with nobody at it')
  })

  it('give nobody’s name where a recovery has no act behind it', async () => {
    const [row] = await rows([step(1, { origin: 'recovery', because: { kind: 'coat on', doneAt: now - hour, by: null } })])
    expect(row?.text()).toContain('Recovery, put in 11:00: the window shut')
  })

  it('add no reason to what the schedule asks for', async () => {
    const [row] = await rows([step(1, {})])
    expect(row?.text()).not.toContain('put in')
  })

  it('bear the mark of their state beside its words: chalk for done, gloss for what dries, hatched for what is in doubt', async () => {
    const film = { hold: null, doubt: null }
    const found = await rows([
      step(1, { status: 'done', doneAt: now - hour }),
      step(2, { status: 'resting', film }),
      step(3, { status: 'resting', film: { hold: null, doubt: 'chilled' } }),
    ])
    const fill = (index: number) => found[index]?.get('svg > rect')
    expect(fill(0)?.classes()).toContain('fill-chalk')
    expect(fill(1)?.attributes('fill')).toMatch(/gloss/)
    expect(fill(2)?.attributes('fill')).toMatch(/hatch/)
    expect(found[0]?.text()).toContain('11:00')
  })

  it('fold what is behind once there is much of it, and leave what is ahead open', async () => {
    const past = [1, 2, 3, 4].map(id => step(id, { status: 'done', doneAt: now - hour }))
    const page = await mountSuspended(PieceSteps, { props: { steps: [...past, step(5, { name: 'Varnish', waitsFor: ['Sand'] })], read: null, state: null, clock } })
    expect(page.findAll(':scope > ol > li, ol:last-of-type > li').at(-1)?.text()).toContain('Varnish')
    expect(page.find('[aria-expanded="false"], details:not([open])').exists()).toBe(true)
    expect(page.text()).toContain('Sand')
  })
})
