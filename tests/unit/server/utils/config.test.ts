import { describe, expect, it } from 'vitest'
import { readConfig } from '~~/server/utils/config'

const secret = 'x'.repeat(32)
const read = (settings: Record<string, string> = {}) => readConfig({ STILLWET_SESSION_SECRET: secret, ...settings })

describe('readConfig', () => {
  it('keeps everything under one folder unless told otherwise', () => {
    expect(read({ STILLWET_DATA: '/var/lib/stillwet' })).toMatchObject({ databaseFile: '/var/lib/stillwet/stillwet.db', backupFolder: '/var/lib/stillwet/backups', storageFolder: '/var/lib/stillwet/storage', outboxFolder: '/var/lib/stillwet/outbox' })
    expect(read({ STILLWET_DATABASE: '/mnt/a.db' }).databaseFile).toBe('/mnt/a.db')
  })
  it('stops without a secret, and with one that is too short', () => {
    expect(() => readConfig({})).toThrow('STILLWET_SESSION_SECRET is missing: give at least 32 random characters.')
    // 31 characters: one short of the least.
    expect(() => read({ STILLWET_SESSION_SECRET: 'x'.repeat(31) })).toThrow('STILLWET_SESSION_SECRET has 31 characters: at least 32 are needed.')
  })
  it('never has the demo studio in production', () => {
    expect(read().demo).toBe(true)
    expect(read({ STILLWET_DEMO: '0' }).demo).toBe(false)
    expect(read({ STILLWET_PRODUCTION: '1', STILLWET_DEMO: '1' }).demo).toBe(false)
  })
  it('refuses the test\'s push switch in production', () => {
    expect(read({ STILLWET_ALLOW_LOOPBACK_PUSH: '1' }).allowLoopbackPush).toBe(true)
    expect(() => read({ STILLWET_ALLOW_LOOPBACK_PUSH: '1', STILLWET_PRODUCTION: '1' })).toThrow('must be off in production')
  })
  it('takes a switch as 1 or 0 only', () => {
    for (const name of ['STILLWET_PRODUCTION', 'STILLWET_DEMO', 'STILLWET_SMTP_SECURE', 'STILLWET_ALLOW_LOOPBACK_PUSH']) expect(() => read({ [name]: 'no' })).toThrow(`${name} must be 1 or 0, not "no".`)
  })
  it('reads a mail server whole or not at all', () => {
    expect(read().smtp).toBeNull()
    expect(() => read({ STILLWET_SMTP_HOST: 'mail.test' })).toThrow('STILLWET_MAIL_FROM is missing')
    expect(() => read({ STILLWET_SMTP_HOST: 'mail.test', STILLWET_MAIL_FROM: 'a@b.test', STILLWET_SMTP_PORT: '99999' })).toThrow('STILLWET_SMTP_PORT must be a whole number from 1 to 65535.')
    expect(read({ STILLWET_SMTP_HOST: 'mail.test', STILLWET_MAIL_FROM: 'a@b.test' }).smtp).toEqual({ host: 'mail.test', port: 587, secure: false, user: null, password: '', from: 'a@b.test' })
  })
  it('asks nobody for the weather unless an address is given', () => {
    expect(read().weatherAddress).toBeNull()
    expect(read({ STILLWET_WEATHER_URL: 'http://127.0.0.1:9/weather' }).weatherAddress).toBe('http://127.0.0.1:9/weather')
    expect(() => read({ STILLWET_WEATHER_URL: 'outside' })).toThrow('STILLWET_WEATHER_URL must be an http or https address, not "outside".')
  })
  it('takes the public address without its last slash', () => {
    expect(read({ STILLWET_PUBLIC_URL: 'https://studio.test/' }).publicUrl).toBe('https://studio.test')
    expect(() => read({ STILLWET_PUBLIC_URL: 'studio.test' })).toThrow('STILLWET_PUBLIC_URL must be an http or https address, not "studio.test".')
  })
})
