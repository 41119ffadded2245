import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { pathToFileURL } from 'node:url'
import { build } from 'vite'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { planProblem } from '#shared/planning/problem'
import { PlanRunner } from '~~/server/utils/planRunner'

const one = planProblem({ activities: [{ id: 'a', minutes: 10 }] })
const two = planProblem({ activities: [{ id: 'a', minutes: 20 }] })

let folder = ''
let built: URL

const script = (name: string, text: string) => {
  const file = join(folder, name)
  writeFileSync(file, text)
  return pathToFileURL(file)
}

beforeAll(async () => {
  folder = mkdtempSync(join(tmpdir(), 'planner-'))
  const root = join(import.meta.dirname, '../../..')
  await build({
    root, configFile: false, logLevel: 'silent', resolve: { alias: { '#shared': join(root, 'shared') } },
    build: { ssr: join(root, 'server/planner/worker.ts'), outDir: folder, rollupOptions: { output: { entryFileNames: 'worker.mjs' } } },
  })
  built = pathToFileURL(join(folder, 'worker.mjs'))
}, 60_000)

afterAll(() => rmSync(folder, { recursive: true }))

describe.each(['in this thread', 'in a worker'])('%s', (where) => {
  const runner = () => new PlanRunner({ worker: where === 'in a worker' ? built : null })

  it('answers with a plan', async () => {
    const planning = runner()
    expect(await planning.run('studio', one)).toMatchObject({ ok: true, plan: { entries: [{ activity: 'a', start: 0, end: 10 }] } })
    await planning.close()
  })

  it('lets the last problem of a key win and leaves other keys alone', async () => {
    const planning = runner()
    const results = await Promise.all([planning.run('x', one), planning.run('x', one), planning.run('y', one), planning.run('x', two)])
    expect(results.map(result => result.ok ? result.plan.entries[0]?.end : result.reason)).toEqual(['superseded', 'superseded', 10, 20])
    await planning.close()
  })

  it('refuses work once closed', async () => {
    const planning = runner()
    const asked = planning.run('x', one)
    await planning.close()
    expect([await asked, await planning.run('x', one)]).toMatchObject([{ reason: 'closed' }, { reason: 'closed' }])
  })
})

describe('a worker that fails', () => {
  it('that crashes is an answer, and the next problem gets a new one', async () => {
    // The first problem in a worker's life kills it unless its seed is 2.
    const planning = new PlanRunner({ worker: script('crash.mjs', `
      import { parentPort } from 'node:worker_threads'
      parentPort.on('message', ({ id, seed }) => seed === 2 ? parentPort.postMessage({ id, ok: false, message: 'alive' }) : process.exit(3))
    `) })
    expect(await planning.run('x', one)).toEqual({ ok: false, reason: 'crashed', message: 'The planner\'s worker ended with code 3.' })
    expect(await planning.run('x', one, { seed: 2 })).toEqual({ ok: false, reason: 'refused', message: 'alive' })
    await planning.close()
  })

  it('that falls silent is ended', async () => {
    const planning = new PlanRunner({ worker: script('silent.mjs', 'import { parentPort } from \'node:worker_threads\'\nparentPort.on(\'message\', () => {})'), millis: 20, patience: 20 })
    expect(await planning.run('x', one)).toMatchObject({ ok: false, reason: 'timeout' })
    await planning.close()
  })

  it('that is not there is named', async () => {
    const planning = new PlanRunner({ worker: pathToFileURL(join(folder, 'absent.mjs')) })
    expect(await planning.run('x', one)).toMatchObject({ ok: false, reason: 'crashed' })
    await planning.close()
  })
})
