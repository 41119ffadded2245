import { join } from 'node:path'

/** Everything the installation decides, read once at boot. The README lists the same variables. */
export interface Config {
  /** STILLWET_PRODUCTION=1: no demo studio, no demo sign-ins, and secrets must be given. */
  production: boolean
  /** STILLWET_DEMO=0: an empty database stays empty; otherwise it gets the demo studio. Never in production. */
  demo: boolean
  /** STILLWET_DATA: folder that holds everything the installation writes. */
  dataFolder: string
  /** STILLWET_DATABASE: the SQLite file. */
  databaseFile: string
  /** STILLWET_BACKUPS: folder for copies of the database. */
  backupFolder: string
  /** STILLWET_STORAGE: folder for photos and data sheets. */
  storageFolder: string
  /** STILLWET_OUTBOX: folder where mail is kept while no mail server is set. */
  outboxFolder: string
  /** STILLWET_PUBLIC_URL: the address people use, without a slash at its end; null: links in messages are told as paths. */
  publicUrl: string | null
  /** STILLWET_SESSION_SECRET: seals the sign-in cookie, at least 32 characters. */
  sessionSecret: string
  /** STILLWET_SMTP_*: the mail server; null: mail goes to the outbox folder. */
  smtp: SmtpConfig | null
  /** STILLWET_PUSH_SUBJECT: mailto: or https: address a push service may write to. */
  pushSubject: string
  /** STILLWET_PUSH_PUBLIC_KEY and STILLWET_PUSH_PRIVATE_KEY: the pair push services know this server by; null: made on first run. */
  pushKeys: { publicKey: string, privateKey: string } | null
  /** STILLWET_ALLOW_LOOPBACK_PUSH=1: push to http://127.0.0.1, for tests; refused in production. */
  allowLoopbackPush: boolean
  /** STILLWET_WEATHER_URL: an address that tells the weather outside; null: nobody is asked. */
  weatherAddress: string | null
}

export interface SmtpConfig {
  /** STILLWET_SMTP_HOST */
  host: string
  /** STILLWET_SMTP_PORT, 587 when not given. */
  port: number
  /** STILLWET_SMTP_SECURE=1: TLS from the first byte (port 465). */
  secure: boolean
  /** STILLWET_SMTP_USER; null: no sign-in at the mail server. */
  user: string | null
  /** STILLWET_SMTP_PASSWORD */
  password: string
  /** STILLWET_MAIL_FROM: sender of every mail. */
  from: string
}

type Environment = Record<string, string | undefined>

/** What is wrong with the settings, as one sentence for the person who starts the server. */
export class ConfigError extends Error {}

const given = (env: Environment, name: string) => env[name]?.trim() || null
const isOn = (env: Environment, name: string, usual: '1' | '0' = '0') => {
  const value = given(env, name) ?? usual
  if (value === '0') return false
  if (value === '1') return true
  throw new ConfigError(`${name} must be 1 or 0, not "${value}".`)
}

function readSecret(env: Environment) {
  const secret = given(env, 'STILLWET_SESSION_SECRET') ?? given(env, 'NUXT_SESSION_PASSWORD')
  if (secret === null) throw new ConfigError('STILLWET_SESSION_SECRET is missing: give at least 32 random characters.')
  if (secret.length < 32) throw new ConfigError(`STILLWET_SESSION_SECRET has ${secret.length} characters: at least 32 are needed.`)
  return secret
}

function readAddress(env: Environment, name: string) {
  const value = given(env, name)
  if (value === null) return null
  if (!URL.canParse(value) || !/^https?:$/.test(new URL(value).protocol)) throw new ConfigError(`${name} must be an http or https address, not "${value}".`)
  return value.replace(/\/+$/, '')
}

function readSmtp(env: Environment): SmtpConfig | null {
  const port = Number(given(env, 'STILLWET_SMTP_PORT') ?? 587)
  if (!Number.isInteger(port) || port < 1 || port > 65535) throw new ConfigError('STILLWET_SMTP_PORT must be a whole number from 1 to 65535.')
  const secure = isOn(env, 'STILLWET_SMTP_SECURE')
  const host = given(env, 'STILLWET_SMTP_HOST')
  if (host === null) return null
  const from = given(env, 'STILLWET_MAIL_FROM')
  if (from === null) throw new ConfigError('STILLWET_MAIL_FROM is missing: a mail server is set, so mail needs a sender.')
  return { host, port, secure, user: given(env, 'STILLWET_SMTP_USER'), password: env.STILLWET_SMTP_PASSWORD ?? '', from }
}

function readPushSubject(env: Environment) {
  const subject = given(env, 'STILLWET_PUSH_SUBJECT') ?? 'mailto:studio@localhost'
  if (!/^(mailto:|https:)/.test(subject)) throw new ConfigError('STILLWET_PUSH_SUBJECT must begin with mailto: or https:.')
  return subject
}

function readPushKeys(env: Environment) {
  const publicKey = given(env, 'STILLWET_PUSH_PUBLIC_KEY')
  const privateKey = given(env, 'STILLWET_PUSH_PRIVATE_KEY')
  if (publicKey !== null && privateKey !== null) return { publicKey, privateKey }
  if (publicKey === null && privateKey === null) return null
  throw new ConfigError('STILLWET_PUSH_PUBLIC_KEY and STILLWET_PUSH_PRIVATE_KEY belong together: give both or neither.')
}

/**
 * Reads the settings out of an environment.
 * @throws {ConfigError} a sentence naming the variable and what it should be
 */
export function readConfig(env: Environment): Config {
  const dataFolder = given(env, 'STILLWET_DATA') ?? '.data'
  const production = isOn(env, 'STILLWET_PRODUCTION')
  const demo = isOn(env, 'STILLWET_DEMO', '1')
  const allowLoopbackPush = isOn(env, 'STILLWET_ALLOW_LOOPBACK_PUSH')
  if (production && allowLoopbackPush) throw new ConfigError('STILLWET_ALLOW_LOOPBACK_PUSH is for tests and must be off in production.')
  return {
    production,
    demo: demo && !production,
    dataFolder,
    databaseFile: given(env, 'STILLWET_DATABASE') ?? join(dataFolder, 'stillwet.db'),
    backupFolder: given(env, 'STILLWET_BACKUPS') ?? join(dataFolder, 'backups'),
    storageFolder: given(env, 'STILLWET_STORAGE') ?? join(dataFolder, 'storage'),
    outboxFolder: given(env, 'STILLWET_OUTBOX') ?? join(dataFolder, 'outbox'),
    publicUrl: readAddress(env, 'STILLWET_PUBLIC_URL'),
    sessionSecret: readSecret(env),
    smtp: readSmtp(env),
    pushSubject: readPushSubject(env),
    pushKeys: readPushKeys(env),
    allowLoopbackPush,
    weatherAddress: readAddress(env, 'STILLWET_WEATHER_URL'),
  }
}

let config: Config | undefined

/** The installation's settings, read at the first call. */
export function useConfig(): Config {
  config ??= readConfig(process.env)
  return config
}
