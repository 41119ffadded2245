import { mountSuspended, registerEndpoint } from '@nuxt/test-utils/runtime'
import { describe, expect, it, vi } from 'vitest'
import SecretMaker from '~/components/settings/SecretMaker.vue'
import { calendarWords } from '#shared/words/calendar'

let made = 0
registerEndpoint('/api/calendar', { method: 'PUT', handler: () => ({ path: `/calendar/secret-${++made}.ics` }) })

describe('a secret address', () => {
  it('is made at once where there is none, and put in place of another only after a question that says what ends', async () => {
    const props = { path: '/api/calendar', there: false, label: calendarWords.label, words: calendarWords }
    const maker = await mountSuspended(SecretMaker, { props })
    const key = (text: string) => maker.findAll('button').find(each => each.text().includes(text))
    await key(calendarWords.make)?.trigger('click')
    await vi.waitFor(() => expect(maker.html()).toContain('secret-1.ics'))

    await maker.setProps({ there: true })
    await key(calendarWords.again)?.trigger('click')
    expect(maker.text()).toContain('Calendars that read the address of now get nothing any more.')
    expect([made, maker.emitted('changed')?.length]).toEqual([1, 1])
    await maker.findAll('dialog button').find(each => each.text() === calendarWords.again)?.trigger('click')
    await vi.waitFor(() => expect(maker.html()).toContain('secret-2.ics'))
    expect(maker.text()).not.toContain(calendarWords.againAsk)
  })
})
