import { describe, expect, it } from 'vitest'
import { isOwnOrigin } from '~~/server/utils/origin'

const from = (source: Partial<Parameters<typeof isOwnOrigin>[0]>) => isOwnOrigin({ origin: null, fetchSite: null, host: 'studio.test:3000', publicUrl: null, ...source })

describe('isOwnOrigin', () => {
  it('takes our own pages', () => expect(from({ origin: 'http://studio.test:3000' })).toBe(true))
  it('takes the public address behind a proxy', () => expect(from({ origin: 'https://board.test', publicUrl: 'https://board.test' })).toBe(true))
  it('refuses another site, another port and a sandboxed page', () => {
    expect(from({ origin: 'https://elsewhere.test' })).toBe(false)
    expect(from({ origin: 'http://studio.test:4000' })).toBe(false)
    expect(from({ origin: 'null' })).toBe(false)
  })
  it('takes what no page sent, such as a sensor', () => expect(from({})).toBe(true))
  it('refuses a page that hides where it is from', () => expect(from({ fetchSite: 'cross-site' })).toBe(false))
})
