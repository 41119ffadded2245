import { describe, expect, it } from 'vitest'
import { makePairCode, pairCodeText, readPairCode } from '#shared/bench/code'

describe('a pairing code', () => {
  it('is made of letters that no eye takes for another, by the chance given', () => {
    // The 23 letters are 346789CDFGHJKMNPQRTVWXY: the first for 0, the last for just under 1.
    expect([makePairCode(() => 0), makePairCode(() => 0.999)]).toEqual(['33333333', 'YYYYYYYY'])
  })
  it('is read as people type it, and in no other length or letters', () => {
    expect(['cdf3-gh47', ' CDF3 GH47 ', 'CDF3GH4', 'CDF3GH47X', 'CDF3GH40'].map(readPairCode)).toEqual(['CDF3GH47', 'CDF3GH47', null, null, null])
    expect(pairCodeText('CDF3GH47')).toBe('CDF3-GH47')
  })
})
