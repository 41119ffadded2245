import { spawn } from 'node:child_process'
import { mkdtempSync, rmSync } from 'node:fs'
import { createServer } from 'node:net'
import type { AddressInfo } from 'node:net'
import { tmpdir } from 'node:os'
import { join } from 'node:path'

export interface TestServer {
  /** Such as http://127.0.0.1:40123, without a slash at its end. */
  origin: string
  /** Folder of its own: database, outbox, backups. */
  folder: string
  databaseFile: string
  /** All it has printed so far. */
  log: () => string
  /** Stops it and waits for its end. The folder goes too unless it was given from outside. */
  stop: () => Promise<void>
  /** Ends it without warning, as a power cut would; the folder stays. */
  kill: () => Promise<void>
}

export const testSecret = 'a secret of the tests, long enough for its purpose'

/** A zone in which it is between ten and eleven now: no evening comes near, whenever the tests run. A demo studio takes it over from the server. */
export function morningZone() {
  const ahead = (10 - new Date().getUTCHours() + 36) % 24 - 12
  return `Etc/GMT${ahead > 0 ? '-' : '+'}${Math.abs(ahead)}`
}

/**
 * Starts the built server on a free port with an empty database of its own and no demo studio.
 * @param settings further variables, such as `{ STILLWET_DEMO: '1' }`
 * @param folder an earlier server's folder, to start again on its data
 */
export async function startServer(settings: Record<string, string> = {}, folder?: string): Promise<TestServer> {
  const own = folder ?? mkdtempSync(join(tmpdir(), 'stillwet-test-'))
  const child = spawn(process.execPath, [join(process.cwd(), '.output/server/index.mjs')], {
    cwd: own,
    env: {
      PATH: process.env.PATH, TZ: morningZone(), NODE_ENV: 'production', HOST: '127.0.0.1', PORT: '0', NITRO_SHUTDOWN_TIMEOUT: '500',
      STILLWET_DATA: own, STILLWET_DEMO: '0', STILLWET_SESSION_SECRET: testSecret, NUXT_SESSION_PASSWORD: testSecret, NUXT_SESSION_COOKIE_SECURE: 'false', ...settings,
    },
    stdio: ['ignore', 'pipe', 'pipe'],
  })
  let log = ''
  const ended = new Promise<number | null>(resolve => child.once('exit', resolve))
  const end = async (signal: NodeJS.Signals) => {
    child.kill(signal)
    await ended
  }
  const origin = await new Promise<string>((resolve, reject) => {
    const read = (chunk: Buffer) => {
      log += chunk.toString()
      const address = /Listening on (http:\/\/\S+)/.exec(log)?.[1]
      if (address) resolve(address.replace(/\/$/, ''))
    }
    child.stdout.on('data', read)
    child.stderr.on('data', read)
    void ended.then(code => reject(new Error(`The server ended with ${code}.\n${log}`)))
    setTimeout(() => reject(new Error(`The server did not start within 20 s.\n${log}`)), 20_000).unref()
  })
  const stop = async () => {
    await end('SIGTERM')
    if (!folder) rmSync(own, { recursive: true, force: true })
  }
  return { origin, folder: own, databaseFile: join(own, 'stillwet.db'), log: () => log, stop, kill: () => end('SIGKILL') }
}

/** A port of this machine on which nobody listens. */
export async function freePort() {
  const probe = createServer()
  await new Promise<void>(resolve => probe.listen(0, '127.0.0.1', resolve))
  const { port } = probe.address() as AddressInfo
  await new Promise<void>(resolve => probe.close(() => resolve()))
  return port
}
