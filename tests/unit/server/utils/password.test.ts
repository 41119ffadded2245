import { describe, expect, it } from 'vitest'
import { makePasswordHash, passwordFits } from '~~/server/utils/password'

describe('passwordFits', () => {
  it('knows the password again and no other', async () => {
    const hash = await makePasswordHash('gesso on ledgers')
    expect(await passwordFits('gesso on ledgers', hash)).toBe(true)
    expect(await passwordFits('gesso on ledger', hash)).toBe(false)
  })
  it('says no without a hash, and with a broken one', async () => {
    expect(await passwordFits('anything', null)).toBe(false)
    expect(await passwordFits('', 'scrypt$$')).toBe(false)
  })
  it('makes another hash each time', async () => {
    expect(await makePasswordHash('gesso on ledgers')).not.toBe(await makePasswordHash('gesso on ledgers'))
  })
})
