import { mountSuspended } from '@nuxt/test-utils/runtime'
import { createError } from 'h3'
import { describe, expect, it, vi } from 'vitest'
import ErrorPage from '~/error.vue'
import { controlWords } from '#shared/words/controls'
import { entry } from '#shared/words/entry'

describe('a page that could not be made', () => {
  it.each([[404, entry.notFound], [500, entry.wentWrong]])('says on %i what that means, and leads to the start', async (statusCode, says) => {
    const page = await mountSuspended(ErrorPage, { props: { error: createError({ statusCode, message: 'no such table: piece' }) } })
    expect(page.get('h1').text()).toBe(says)
    expect(page.findAll('button').at(-1)?.text()).toBe(entry.toStart)
    // What the server says of itself is nobody's business here.
    expect(page.text()).not.toContain('no such table')
  })

  it('can be asked for again where it went wrong, and not where there is nothing', async () => {
    const keysOf = async (statusCode: number) => (await mountSuspended(ErrorPage, { props: { error: createError({ statusCode }) } })).findAll('button').map(key => key.text())
    expect(await keysOf(404)).toEqual([entry.toStart])
    expect(await keysOf(500)).toEqual([controlWords.tryAgain, entry.toStart])
    const reload = vi.spyOn(window.location, 'reload').mockImplementation(() => undefined)
    const page = await mountSuspended(ErrorPage, { props: { error: createError({ statusCode: 500 }) } })
    await page.get('button').trigger('click')
    expect(reload).toHaveBeenCalledOnce()
  })
})
