import { mountSuspended } from '@nuxt/test-utils/runtime'
import { createError } from 'h3'
import { describe, expect, it } from 'vitest'
import ErrorPage from '~/error.vue'
import { entry } from '#shared/words/entry'

describe('a page that could not be made', () => {
  it.each([[404, entry.notFound], [500, entry.wentWrong]])('says on %i what that means, and leads to the start', async (statusCode, says) => {
    const page = await mountSuspended(ErrorPage, { props: { error: createError({ statusCode, message: 'no such table: piece' }) } })
    expect(page.get('h1').text()).toBe(says)
    expect(page.get('button').text()).toBe(entry.toStart)
    // What the server says of itself is nobody's business here.
    expect(page.text()).not.toContain('no such table')
  })
})
