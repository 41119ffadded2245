import { and, eq, inArray, or } from 'drizzle-orm'
import { adviceAnswer, coat } from '~~/db/schema'
import type { Database } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import { hazeGap } from '#shared/drying/haze'
import type { HazeSeen } from '#shared/drying/haze'
import type { AdviceAnswer } from '#shared/terms'

/** Gone on with and nothing told of for so long: the film was clear. */
const clearAfterMs = 24 * 60 * 60_000

interface Answered { answer: AdviceAnswer, gapC: number | null }

/** What was answered about some coats and turns, by coat or turn and code. What was said of a turn holds for the coat that came of it. */
export function answersOf(db: Database, studioId: number, coats: readonly { id: number, turnId: number | null }[], turnIds: readonly number[]) {
  const turns = [...turnIds, ...coats.flatMap(each => each.turnId ?? [])]
  const rows = coats.length + turns.length === 0
    ? []
    : db.select().from(adviceAnswer).where(scoped(adviceAnswer, studioId, or(inArray(adviceAnswer.coatId, coats.map(each => each.id)), inArray(adviceAnswer.turnId, turns)))).all()
  const turnOf = new Map(coats.map(each => [each.id, each.turnId]))
  const ofTurn = (turnId: number | null, code: string): Answered | null => rows.find(row => turnId !== null && row.turnId === turnId && row.code === code) ?? null
  return { ofTurn, ofCoat: (coatId: number, code: string): Answered | null => rows.find(row => row.coatId === coatId && row.code === code) ?? ofTurn(turnOf.get(coatId) ?? null, code) }
}

/** One word about one act: a row of six boxes that hazed is one sight of haze. */
interface HazeTold { versionId: number, actId: number, answer: AdviceAnswer, gapC: number | null, at: number }

/** What was said of haze on the coats of this studio, the coat's own word before the one its turn got. */
export function hazeTold(db: Database, studioId: number): HazeTold[] {
  const rows = db.select({ coatId: coat.id, versionId: coat.materialVersionId, actId: coat.actId, ofCoat: adviceAnswer.coatId, answer: adviceAnswer.answer, gapC: adviceAnswer.gapC, at: adviceAnswer.at })
    .from(adviceAnswer).innerJoin(coat, or(eq(coat.id, adviceAnswer.coatId), eq(coat.turnId, adviceAnswer.turnId)))
    .where(and(scoped(adviceAnswer, studioId, eq(adviceAnswer.code, 'blush')), eq(coat.studioId, studioId))).all()
  const acts = new Map<string, HazeTold>()
  for (const row of rows.sort((a, b) => Number(a.ofCoat !== null) - Number(b.ofCoat !== null))) {
    if (row.versionId !== null) acts.set(`${row.versionId} ${row.actId}`, { versionId: row.versionId, actId: row.actId, answer: row.answer, gapC: row.gapC, at: row.at })
  }
  return [...acts.values()]
}

/** The gap to the dew point, kelvin, under which each material edition hazes here by what was told; editions nobody told of are left out. */
export function hazeGaps(told: readonly HazeTold[], now: number): Map<number, number> {
  const seen = new Map<number, HazeSeen[]>()
  for (const { versionId, answer, gapC, at } of told) {
    const clear = answer === 'going on' && now - at > clearAfterMs
    if (gapC === null || !(clear || answer === 'haze')) continue
    seen.set(versionId, [...seen.get(versionId) ?? [], { gapC, haze: answer === 'haze' }])
  }
  return new Map([...seen].map(([versionId, sights]) => [versionId, hazeGap(sights)]))
}
