import { eq } from 'drizzle-orm'
import { studio } from '~~/db/schema'
import { answersOf, hazeGaps, hazeTold } from '~~/server/services/advice/answers'
import { filmAdvice } from '~~/server/services/advice/films'
import type { Said } from '~~/server/services/advice/films'
import { turnAdvice } from '~~/server/services/advice/turns'
import type { Database } from '~~/server/utils/database'
import type { AdviceLine } from '#shared/schemas/advice'
import { presses } from '#shared/words/advice'
import { answersTo, hazeKnown } from '#shared/words/advice-answers'

/**
 * All advice about the films that are on and about what may be begun within hours, the pressing first: the same sentence about several coats or turns is one line.
 * @param pieceIds only these; null means the whole studio
 * @param now ms UTC
 */
export function adviceNow(db: Database, studioId: number, pieceIds: readonly number[] | null, now: number): AdviceLine[] {
  const owner = db.select().from(studio).where(eq(studio.id, studioId)).get()
  if (!owner) return []
  const told = hazeTold(db, studioId)
  const asked = { db, owner, pieceIds, now, gaps: hazeGaps(told, now) }
  const films = filmAdvice(asked)
  const turns = turnAdvice(asked)
  const answers = answersOf(db, studioId, films.coats, turns.flatMap(each => each.turnId ?? []))
  const lines = new Map<string, AdviceLine>()
  for (const said of [...films.said, ...turns]) {
    const answered = (said.coatId === null ? answers.ofTurn(said.turnId, said.code) : answers.ofCoat(said.coatId, said.code))?.answer ?? null
    const known = said.code === 'blush' ? knownOf(said, told) : null
    const key = [said.code, said.text, answered, known].join('|')
    const line = lines.get(key) ?? { code: said.code, text: said.text, presses: presses(said.code), answers: answersTo(said.code, said.coatId !== null), answered, known, gapC: said.gapC, coatIds: [], turnIds: [] }
    if (said.coatId !== null) line.coatIds.push(said.coatId)
    if (said.turnId !== null) line.turnIds.push(said.turnId)
    lines.set(key, line)
  }
  return [...lines.values()].sort((a, b) => Number(b.presses) - Number(a.presses))
}

/** What haze has done to the same material on other coats here. */
function knownOf(said: Said, told: readonly { versionId: number, actId: number, answer: string }[]): string | null {
  const others = told.filter(each => each.versionId === said.versionId && each.actId !== said.actId)
  return hazeKnown({ wentOn: others.filter(each => each.answer === 'going on').length, haze: others.filter(each => each.answer === 'haze').length })
}
