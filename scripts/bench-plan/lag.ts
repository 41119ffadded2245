import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { monitorEventLoopDelay } from 'node:perf_hooks'
import { setTimeout as wait } from 'node:timers/promises'
import { pathToFileURL } from 'node:url'
import { build } from 'vite'
import { PlanRunner } from '../../server/utils/planRunner'
import { studioProblem } from '../bench/planner'
import type { Row } from './row'

async function delay(work: () => Promise<unknown>): Promise<number> {
  const monitor = monitorEventLoopDelay({ resolution: 2 })
  monitor.enable()
  await work()
  monitor.disable()
  return monitor.percentile(99) / 1e6
}

const seconds = 3

/** How much later the server's own thread answers while the worker searches. */
export async function benchLag(told: (row: Row) => void): Promise<void> {
  const root = join(import.meta.dirname, '../..')
  const folder = mkdtempSync(join(tmpdir(), 'planner-bench-'))
  try {
    await build({
      root, configFile: false, logLevel: 'silent', resolve: { alias: { '#shared': join(root, 'shared') } },
      build: { ssr: join(root, 'server/planner/worker.ts'), outDir: folder, rollupOptions: { output: { entryFileNames: 'worker.mjs' } } },
    })
    const runner = new PlanRunner({ worker: pathToFileURL(join(folder, 'worker.mjs')), millis: seconds * 1000 })
    const problem = studioProblem(60)
    await runner.run('warm', problem, { schedules: 1 })
    const idle = await delay(() => wait(seconds * 1000))
    const busy = await delay(() => runner.run('lag', problem))
    await runner.close()
    told({ measure: 'event loop lag, p99 while solving minus p99 idle', bar: '10 ms', aim: '3 ms', measured: `${(busy - idle).toFixed(1)} ms (${busy.toFixed(1)} - ${idle.toFixed(1)})`, met: busy - idle < 10 })
  }
  finally {
    rmSync(folder, { recursive: true })
  }
}
