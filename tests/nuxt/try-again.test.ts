import { mountSuspended } from '@nuxt/test-utils/runtime'
import { describe, expect, it } from 'vitest'
import { defineComponent, h } from 'vue'
import { useAsyncData } from '#imports'
import BaseFailed from '~/components/base/BaseFailed.vue'

describe('trying again', () => {
  it('tries every part of the page again that failed, also one that shows no key', async () => {
    const asked: string[] = []
    const part = (says: string) => h(BaseFailed, { says, onAgain: () => asked.push(says) })
    let reached = false
    const page = await mountSuspended(defineComponent({
      async setup() {
        const { data } = await useAsyncData('names', () => reached ? Promise.resolve('found') : Promise.reject(new Error('not reached')))
        return () => h('div', [part('The week'), part('The calls'), h('p', data.value ?? 'nothing')])
      },
    }))
    expect(page.get('p:last-child').text()).toBe('nothing')
    reached = true
    await page.get('button').trigger('click')
    expect(asked).toEqual(['The week', 'The calls'])
    await expect.poll(() => page.get('div > p:last-child').text()).toBe('found')
  })

  it('asks nothing of a part that has left the page', async () => {
    const asked: string[] = []
    const gone = await mountSuspended(BaseFailed, { props: { says: 'The air', onAgain: () => asked.push('The air') } })
    gone.unmount()
    const stays = await mountSuspended(BaseFailed, { props: { says: 'The week', onAgain: () => asked.push('The week') } })
    await stays.get('button').trigger('click')
    expect(asked).toEqual(['The week'])
    stays.unmount()
  })
})
