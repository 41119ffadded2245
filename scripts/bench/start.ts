import { spawn } from 'node:child_process'
import { mkdtempSync, rmSync } from 'node:fs'
import { createServer } from 'node:net'
import type { AddressInfo } from 'node:net'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { performance } from 'node:perf_hooks'

const barMs = 5000
const patienceMs = 300_000

async function freePort(): Promise<number> {
  const probe = createServer()
  await new Promise<void>(resolve => probe.listen(0, '127.0.0.1', resolve))
  const { port } = probe.address() as AddressInfo
  await new Promise<void>(resolve => probe.close(() => resolve()))
  return port
}

/** Runs `npm start` as a person would and stops it when the first page has come whole. Milliseconds from the one to the other. */
async function firstPageMs(folder: string): Promise<number> {
  const port = await freePort()
  const from = performance.now()
  // A process group of its own, for npm does not pass every signal on.
  const child = spawn('npm', ['start'], { detached: true, stdio: 'ignore', env: { ...process.env, STILLWET_DATA: folder, STILLWET_PORT: String(port) } })
  const ended = new Promise<void>(resolve => child.once('exit', () => resolve()))
  try {
    while (performance.now() - from < patienceMs) {
      const page = await fetch(`http://127.0.0.1:${port}/sign-in`).then(async answer => answer.ok && (await answer.text()).includes('<h1'), () => false)
      if (page) return performance.now() - from
      if (child.exitCode !== null) throw new Error(`npm start ended with ${child.exitCode}.`)
      await new Promise(resolve => setTimeout(resolve, 50))
    }
    throw new Error(`npm start showed no page in ${patienceMs / 1000} s.`)
  }
  finally {
    if (child.pid !== undefined) process.kill(-child.pid, 'SIGTERM')
    await ended
  }
}

/** Starts the product twice on one new folder: the first makes the demo studio (and what was not built), the second has all. */
export async function benchStart(): Promise<string[]> {
  const folder = mkdtempSync(join(tmpdir(), 'stillwet-bench-'))
  try {
    const first = await firstPageMs(folder)
    const second = await firstPageMs(folder)
    return [
      'start: npm start to the first page, on a folder of its own',
      `  first: ${(first / 1000).toFixed(1)} s; second: ${(second / 1000).toFixed(1)} s`,
      `  bar for the second 5 s: ${(second / barMs).toFixed(2)} of it`,
    ]
  }
  finally {
    rmSync(folder, { recursive: true, force: true })
  }
}
