import { and, asc, eq, inArray, isNotNull, isNull } from 'drizzle-orm'
import { coat, studio } from '~~/db/schema'
import type { Database, Transaction } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import { airOf, roomAirs } from '~~/server/work/air'
import { benchesOf } from '~~/server/work/benches'
import { caseOf, clocks, readFacts, spansOf } from '~~/server/work/film-cases'
import type { CoatRow } from '~~/server/work/film-cases'
import { dryingMaterials } from '~~/server/work/materials'
import { relearn } from '~~/server/work/relearn'
import { storePredictions } from '~~/server/work/store-predictions'
import { predictCoat } from '#shared/drying/predict'
import type { CoatPrediction } from '#shared/drying/types'

type Reader = Database | Transaction

export interface PredictedCoat { coat: CoatRow, prediction: CoatPrediction }

/**
 * Foretells every film that can still change an answer and writes the difference: times, windows, chills, and which
 * films are settled. Runs inside the transaction of the change that asked for it, so no reader ever sees a coat
 * whose times are those of before. What tests of these pieces teach about a material moves its other films as well.
 * @param pieceIds only these pieces; null means the whole studio, after a reading say
 */
export function predictPieces(tx: Transaction, studioId: number, pieceIds: readonly number[] | null, now: number) {
  const taught = relearn(tx, studioId, pieceIds, now)
  const wanted = pieceIds && taught.length > 0 ? [...new Set([...pieceIds, ...piecesWith(tx, studioId, taught)])] : pieceIds
  storePredictions(tx, studioId, predictFilms(tx, studioId, wanted, now), now)
}

/** The pieces with a film of some material editions that is not settled. */
function piecesWith(tx: Transaction, studioId: number, versionIds: readonly number[]): number[] {
  return tx.selectDistinct({ pieceId: coat.pieceId }).from(coat)
    .where(and(scoped(coat, studioId, isNull(coat.settledAt), isNull(coat.strippedAt)), isNotNull(coat.materialVersionId), inArray(coat.materialVersionId, [...versionIds]))).all().map(row => row.pieceId)
}

/**
 * The same without writing: what the films of some pieces would do.
 * @param hazeGaps the gap to the dew point under which a material edition hazes here, kelvin, where anybody has seen it; only advice asks for it
 */
export function predictFilms(db: Reader, studioId: number, pieceIds: readonly number[] | null, now: number, hazeGaps?: ReadonlyMap<number, number>): PredictedCoat[] {
  const owner = db.select().from(studio).where(eq(studio.id, studioId)).get()
  const coats = db.select().from(coat).where(scoped(coat, studioId, isNull(coat.settledAt), isNull(coat.strippedAt), pieceIds ? inArray(coat.pieceId, [...pieceIds]) : undefined)).orderBy(asc(coat.endedAt)).all()
  if (!owner || coats.length === 0) return []
  const facts = readFacts(db, studioId, coats)
  const materials = dryingMaterials(db, studioId, coats.flatMap(each => each.materialVersionId ?? []))
  const since = coats.reduce((first, each) => Math.min(first, each.endedAt), now)
  const benches = benchesOf(db, studioId, materials)
  const clockOf = clocks(roomAirs(db, owner, since), airOf(owner), since)
  return coats.flatMap((row) => {
    const film = caseOf(row, facts)
    const material = row.materialVersionId === null ? null : benches.materialFor(row.materialVersionId, row.id)
    return material ? [{ coat: row, prediction: predictCoat(material, film, spansOf(row, facts, clockOf), { now, hazeGapC: hazeGaps?.get(row.materialVersionId ?? 0) }) }] : []
  })
}
