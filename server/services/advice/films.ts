import { inArray } from 'drizzle-orm'
import { coatTarget } from '~~/db/schema'
import { answersOf } from '~~/server/services/advice/answers'
import { wetCoats } from '~~/server/services/vapour-facts'
import type { StudioRow } from '~~/server/services/sessions'
import type { Database } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import { predictFilms } from '~~/server/work/predict'
import { roomsOfParts } from '~~/server/work/rooms-of-parts'
import { isSolventBorne } from '#shared/vapour/facts'
import { adviceText, besideSolventText } from '#shared/words/advice'
import { hazeAfterText } from '#shared/words/advice-answers'

/** What is asked: which pieces (null: all), when (ms UTC), and the gaps to the dew point under which materials haze here, by edition. */
export interface Asked { db: Database, owner: StudioRow, pieceIds: readonly number[] | null, now: number, gaps: ReadonlyMap<number, number> }

/** One sentence about one coat or one turn. `gapC` when it is about haze. */
export interface Said { code: string, text: string, coatId: number | null, turnId: number | null, versionId: number | null, actId: number | null, gapC: number | null }

/** Haze is seen when the film has dried: so long after the coat went on it may still be told. */
const hazeSeenMs = 48 * 60 * 60_000

/** Rooms with a wet solvent film: nothing that warms or blows is advised there. */
export function solventRoomsNow(db: Database, studioId: number, now: number): Set<number> {
  return new Set([...wetCoats(db, studioId, now)].flatMap(([roomId, coats]) => coats.some(each => isSolventBorne(each.solvent)) ? [roomId] : []))
}

/** What the air has to say about the films that can still change an answer. */
export function filmAdvice({ db, owner, pieceIds, now, gaps }: Asked) {
  const films = predictFilms(db, owner.id, pieceIds, now, gaps)
  const coats = films.map(({ coat }) => ({ id: coat.id, turnId: coat.turnId }))
  const beside = besideOf(db, owner.id, films.map(({ coat }) => coat), now)
  const answers = answersOf(db, owner.id, coats, [])
  const said = films.flatMap(({ coat, prediction }): Said[] => {
    const about = { coatId: coat.id, turnId: null, versionId: coat.materialVersionId, actId: coat.actId }
    const lines = prediction.advice.map(({ code, facts }): Said => ({
      ...about, code, text: (beside(coat.id) ? besideSolventText(code) : null) ?? adviceText(facts, owner.units), gapC: facts.code === 'blush' ? facts.gapC : null,
    }))
    const haze = answers.ofCoat(coat.id, 'blush')
    const asks = haze !== null && haze.gapC !== null && haze.answer !== 'waiting' && now - coat.endedAt < hazeSeenMs && !lines.some(line => line.code === 'blush')
    return asks && haze.gapC !== null ? [...lines, { ...about, code: 'blush', text: hazeAfterText(haze.gapC, owner.units), gapC: haze.gapC }] : lines
  })
  return { coats, said }
}

/** Whether a coat lies in a room with a wet solvent film. */
function besideOf(db: Database, studioId: number, coats: readonly { id: number, pieceId: number }[], now: number) {
  const wet = solventRoomsNow(db, studioId, now)
  if (wet.size === 0) return () => false
  const roomOf = roomsOfParts(db, studioId, [...new Set(coats.map(each => each.pieceId))])
  const targets = db.select({ coatId: coatTarget.coatId, partId: coatTarget.partId }).from(coatTarget).where(scoped(coatTarget, studioId, inArray(coatTarget.coatId, coats.map(each => each.id)))).all()
  const found = new Set(targets.filter(each => wet.has(roomOf(each.partId)?.id ?? 0)).map(each => each.coatId))
  return (coatId: number) => found.has(coatId)
}
