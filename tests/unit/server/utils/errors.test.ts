import { describe, expect, it } from 'vitest'
import { absent, conflict, impossible, isRefusal, malformed, notAllowed, notSignedIn, toHttp, tooMany } from '~~/server/utils/errors'

describe('toHttp', () => {
  it.each([
    [malformed({ name: 'Give a name.' }), 400], [notSignedIn(), 401], [notAllowed(), 403], [absent(), 404],
    [conflict('Somebody was first.'), 409], [impossible('It cannot be.'), 422], [tooMany(), 429],
  ])('answers $reason with %i', (refusal, status) => {
    expect(toHttp(refusal).statusCode).toBe(status)
  })
  it('carries the sentence, the fields and what stands there now', () => {
    expect(toHttp(conflict('Somebody was first.', { version: 4 })).data).toEqual({ reason: 'conflict', message: 'Somebody was first.', fields: undefined, current: { version: 4 } })
  })
})

describe('isRefusal', () => {
  it('knows a refusal from an answer that only looks like one', () => {
    expect(isRefusal(absent())).toBe(true)
    expect(isRefusal({ ok: true })).toBe(false)
    expect(isRefusal({ ok: false, reason: 'weather' })).toBe(false)
    expect(isRefusal(null)).toBe(false)
  })
})
