import { createECDH } from 'node:crypto'
import ece from 'http_ece'
import { describe, expect, it } from 'vitest'

/**
 * RFC 8291, "Message Encryption for Web Push", section 5 and appendix A: the application server's message with its
 * fixed key pair and salt, and the 144 bytes that come out (86 of header, 41 of text, 1 of padding delimiter, 16 of tag).
 */
const published = {
  plaintext: 'When I grow up, I want to be a watermelon',
  serverPublic: 'BP4z9KsN6nGRTbVYI_c7VJSPQTBtkgcy27mlmlMoZIIgDll6e3vCYLocInmYWAmS6TlzAC8wEqKK6PBru3jl7A8',
  serverPrivate: 'yfWPiYE-n46HLnH0KqZOF1fJJU3MYrct3AELtAQ-oRw',
  browserPublic: 'BCVxsr7N_eNgVRqvHtD0zTZsEc6-VV-JvLexhqUzORcxaOzi6-AYWXvTBHm4bjyPjs7Vd8pZGH6SRpkNtoIAiw4',
  browserPrivate: 'q1dXpw3UpT5VOmu_cf_v6ih07Aems3njxI-JWgLcM94',
  auth: 'BTBZMqHH6r4Tts7J_aSIgg',
  salt: 'DGv6ra1nlYgDCS1FRnbzlw',
  message: [
    'DGv6ra1nlYgDCS1FRnbzlwAAEABBBP4z9KsN6nGRTbVYI_c7VJSPQTBtkgcy27ml',
    'mlMoZIIgDll6e3vCYLocInmYWAmS6TlzAC8wEqKK6PBru3jl7A_yl95bQpu6cVPT',
    'pK4Mqgkf1CXztLVBSt2Ks3oZwbuwXPXLWyouBWLVWGNWQexSgSxsj_Qulcy4a-fN',
  ].join(''),
}

function keyPair(privateKey: string) {
  const pair = createECDH('prime256v1')
  pair.setPrivateKey(Buffer.from(privateKey, 'base64url'))
  return pair
}

describe('the published example of RFC 8291', () => {
  it('has the public keys that belong to its private ones', () => {
    expect(keyPair(published.serverPrivate).getPublicKey().toString('base64url')).toBe(published.serverPublic)
    expect(keyPair(published.browserPrivate).getPublicKey().toString('base64url')).toBe(published.browserPublic)
  })

  it('is reproduced to the last byte by the encryption this server sends with', () => {
    const message = ece.encrypt(Buffer.from(published.plaintext), {
      version: 'aes128gcm',
      privateKey: keyPair(published.serverPrivate),
      dh: published.browserPublic,
      authSecret: published.auth,
      salt: published.salt,
    })
    expect(message).toHaveLength(144)
    expect(message.toString('base64url')).toBe(published.message)
  })

  it('is read by the receiver', () => {
    const text = ece.decrypt(Buffer.from(published.message, 'base64url'), {
      version: 'aes128gcm', privateKey: keyPair(published.browserPrivate), authSecret: published.auth,
    })
    expect(text.toString()).toBe(published.plaintext)
  })
})
