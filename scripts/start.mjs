// npm start: gives the built server what it cannot run without, then becomes it. README lists the variables.
import { randomBytes } from 'node:crypto'
import { once } from 'node:events'
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs'
import { createServer } from 'node:net'
import { join } from 'node:path'

function stop(sentence) {
  console.error(`Stillwet cannot start. ${sentence}`)
  process.exit(2)
}

function readPem(name) {
  const file = process.env[name]
  if (!file) return null
  try {
    return readFileSync(file, 'utf8')
  }
  catch {
    return stop(`${name} names ${file}, which cannot be read.`)
  }
}

/** Takes the address and gives it back: what the server's own listening would fail at with a stack trace is said here in one sentence. */
async function holdAddress(host, port) {
  const probe = createServer()
  probe.listen(port, host)
  try {
    await once(probe, 'listening')
  }
  catch (error) {
    stop(listenFailures[error.code]?.(host, port) ?? `${host} and port ${port} cannot be listened on: ${error.code}.`)
  }
  probe.close()
  await once(probe, 'close')
}

const noAddress = host => `STILLWET_HOST must be an address of this machine, such as 127.0.0.1 or 0.0.0.0, not "${host}".`
const listenFailures = {
  ENOTFOUND: noAddress,
  EAI_AGAIN: noAddress,
  EADDRNOTAVAIL: noAddress,
  EADDRINUSE: (host, port) => `Port ${port} is taken already: stop what listens there, or give another with STILLWET_PORT.`,
  EACCES: (host, port) => `Port ${port} is not open to this user: give one above 1023 with STILLWET_PORT.`,
}

/** Outside production a secret is made once and kept beside the data, readable by its owner alone. */
function ensureSecret(folder) {
  if (process.env.STILLWET_SESSION_SECRET || process.env.STILLWET_PRODUCTION === '1') return
  const file = join(folder, 'session-secret')
  mkdirSync(folder, { recursive: true })
  if (!existsSync(file)) writeFileSync(file, randomBytes(32).toString('base64url'), { mode: 0o600 })
  process.env.STILLWET_SESSION_SECRET = readFileSync(file, 'utf8').trim()
}

if (existsSync('.env')) process.loadEnvFile('.env')
process.env.NODE_ENV = 'production'
ensureSecret(process.env.STILLWET_DATA || '.data')
if (process.env.STILLWET_SESSION_SECRET) process.env.NUXT_SESSION_PASSWORD = process.env.STILLWET_SESSION_SECRET

const certificate = readPem('STILLWET_TLS_CERT')
const key = readPem('STILLWET_TLS_KEY')
if ((certificate === null) !== (key === null)) stop('STILLWET_TLS_CERT and STILLWET_TLS_KEY go together: give both or neither.')
if (certificate !== null && key !== null) Object.assign(process.env, { NITRO_SSL_CERT: certificate, NITRO_SSL_KEY: key })

const secure = certificate !== null || (process.env.STILLWET_PUBLIC_URL ?? '').startsWith('https:')
// Over plain http a cookie marked secure would be dropped, and nobody could stay signed in.
process.env.NUXT_SESSION_COOKIE_SECURE = String(secure)
process.env.HOST = process.env.STILLWET_HOST || '127.0.0.1'
process.env.PORT = process.env.STILLWET_PORT || process.env.PORT || '3000'
if (!/^\d+$/.test(process.env.PORT) || Number(process.env.PORT) > 65535) stop(`STILLWET_PORT must be a whole number from 0 to 65535, not "${process.env.PORT}".`)
await holdAddress(process.env.HOST, Number(process.env.PORT))
process.env.NITRO_SHUTDOWN_TIMEOUT ??= '3000'

await import('../.output/server/index.mjs')
