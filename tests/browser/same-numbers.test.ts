import { execFileSync } from 'node:child_process'
import { fileURLToPath } from 'node:url'
import { asc, eq } from 'drizzle-orm'
import type { Browser } from 'playwright-core'
import { build } from 'vite'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { coat, materialVersion, prediction } from '~~/db/schema'
import { recordAct } from '~~/server/services/acts'
import { startBatch } from '~~/server/services/batches'
import { pieceStates } from '~~/server/services/piece-states'
import { addReading } from '~~/server/services/readings'
import { dryingMaterials } from '~~/server/work/materials'
import type { ActRequest } from '#shared/schemas/act'
import type { readCase } from '../../scripts/model/read-case'
import type { runCase } from '../../scripts/model/run-case'
import type { dryingTools } from '#shared/drying/tools'
import { openBrowser } from '../helpers/browser'
import { hour, minute, testStudio } from '../helpers/studio'

const root = fileURLToPath(new URL('../..', import.meta.url))
const began = Date.parse('2026-04-07T07:00:00Z')
const iso = (at: number) => new Date(at).toISOString()

interface Line { name: string, likely: string | null, giveTill: string | null }
type Model = { readCase: typeof readCase, runCase: typeof runCase, dryingTools: typeof dryingTools }

/** The model's own modules as one script, as a browser would get them; the name it leaves on `window` is "model". */
async function browserScript(): Promise<string> {
  const entry = 'model-entry.ts'
  const code = `export { readCase } from '${root}scripts/model/read-case.ts'\nexport { runCase } from '${root}scripts/model/run-case.ts'\nexport { dryingTools } from '#shared/drying/tools'`
  const built = await build({
    configFile: false, logLevel: 'silent', root,
    resolve: { alias: { '#shared': `${root}shared` } },
    plugins: [{ name: 'entry', enforce: 'pre', resolveId: id => id.endsWith(entry) ? `${root}${entry}` : null, load: id => id.endsWith(entry) ? code : null }],
    build: { write: false, minify: true, lib: { entry, formats: ['iife'], name: 'model', fileName: 'model' } },
  })
  const [output] = Array.isArray(built) ? built : [built]
  if (!output || !('output' in output)) throw new Error('The script was not built.')
  return output.output[0].code
}

/** A studio that tested two coats of one paint yesterday and put a third on: what its rows say, and the same as a case. */
function inTheStudio(): { rows: Line[], given: Record<string, unknown> } {
  const studio = testStudio(began)
  const who = studio.members.maker
  const readings = [[0, 17, 0.62], [6, 21, 0.5], [24, 16, 0.66], [28, 22, 0.48]].map(([hours, tempC, rh]) => ({ at: began + hours! * hour, tempC: tempC!, rh: rh! }))
  for (const [i, { at, tempC, rh }] of readings.entries()) addReading(studio.db, studio.studioId, who.id, studio.rooms.bench, { clientKey: `reading-${i}`, at: iso(at), tempC, rh, words: null, same: false }, at)
  let told = 0
  const tell = (kind: ActRequest['kind'], pieceId: number, at: number, body: ActRequest['body']) => {
    const pieces = pieceStates(studio.db, studio.studioId, [pieceId]).map(({ id, version }) => ({ id, version }))
    const answer = recordAct(studio.db, studio.studioId, { member: who }, { clientKey: `act-${told++}`, kind, doneAt: iso(at), pieces, body }, at)
    if (!answer.ok) throw new Error(answer.message)
  }
  const coats = [0, 1, 28].map((hours, i) => {
    const at = began + hours * hour
    const started = startBatch(studio.db, studio.studioId, { member: who }, { clientKey: `start-${i}`, name: `Boxes ${i}`, scheduleId: studio.scheduleOf('painted-waxed-box'), pieces: [`Box ${i}`], sizeUnits: 1, placeId: studio.places.shelf, order: null, startsAt: iso(at), oldObject: false }, at)
    if (!started.ok) throw new Error(started.message)
    tell('coat on', started.pieceIds[0]!, at, { step: 'lid-1' })
    return started.pieceIds[0]!
  })
  const tests = [[{ minutes: 75, reached: false }, { minutes: 400, reached: true }], [{ minutes: 130, reached: false }, { minutes: 700, reached: true }]]
  const rowOf = (pieceId: number) => studio.db.select().from(coat).where(eq(coat.pieceId, pieceId)).get()!
  const rungs = studio.db.select().from(prediction).where(eq(prediction.coatId, rowOf(coats[2]!).id)).orderBy(asc(prediction.ordinal)).all()
  const rung = rungs[Math.min(2, rungs.length - 1)]!.milestone
  for (const [i, own] of tests.entries()) for (const test of own) tell('touch test', coats[i]!, rowOf(coats[i]!).endedAt + test.minutes * minute, { milestone: rung, reached: test.reached })
  const on = coats.map(rowOf)
  const version = studio.db.select().from(materialVersion).where(eq(materialVersion.id, on[2]!.materialVersionId!)).get()!
  const caseOf = (i: number) => ({
    appliedAt: iso(on[i]!.endedAt), coat: on[i]!.size, ground: on[i]!.ground, readings: readings.map(each => ({ ...each, at: iso(each.at) })),
    tests: (tests[i] ?? []).map(({ minutes, reached }) => ({ at: iso(on[i]!.endedAt + minutes * minute), milestone: rung, reached })),
  })
  const rows = studio.db.select().from(prediction).where(eq(prediction.coatId, on[2]!.id)).orderBy(asc(prediction.ordinal)).all()
  return {
    rows: rows.map(row => ({ name: row.milestone, likely: row.likelyAt === null ? null : iso(row.likelyAt), giveTill: row.p90At === null ? null : iso(row.p90At) })),
    given: { ...caseOf(2), material: dryingMaterials(studio.db, studio.studioId, [version.id]).get(version.id), heated: true, nightDropC: 0, zone: 'UTC', usual: { tempC: 20, rh: 0.5 }, history: [caseOf(0), caseOf(1)], now: iso(began + 30 * hour) },
  }
}

describe('a coat foretold with what its fellows taught', () => {
  let browser: Browser
  beforeAll(async () => {
    browser = await openBrowser()
  })
  afterAll(() => browser.close())

  it('has the same times from the server, the command line and a browser', async () => {
    const { rows, given } = inTheStudio()
    const lines = (result: { milestones: Line[] }) => result.milestones.map(({ name, likely, giveTill }) => ({ name, likely, giveTill }))
    const printed = execFileSync(process.execPath, ['--import', 'tsx', 'scripts/model.ts', '-'], { cwd: root, input: JSON.stringify(given), encoding: 'utf8' })
    expect(lines(JSON.parse(printed) as { milestones: Line[] })).toEqual(rows)
    const page = await browser.newPage()
    await page.addScriptTag({ content: await browserScript() })
    const shown = await page.evaluate((text) => {
      const { model } = window as unknown as { model: Model }
      return JSON.stringify(model.runCase(model.readCase(JSON.parse(text), ''), model.dryingTools()))
    }, JSON.stringify(given))
    await page.close()
    expect(lines(JSON.parse(shown) as { milestones: Line[] })).toEqual(rows)
  })
})
