import { asc, eq, inArray, or } from 'drizzle-orm'
import { act, actSubject, part, touchTest, vapourStart } from '~~/db/schema'
import { correctionReach } from '~~/server/services/acts'
import { facesOfPieces } from '~~/server/services/faces'
import { memberNames } from '~~/server/services/member-names'
import { actDetails } from '~~/server/services/piece-names'
import { hiddenFrom } from '~~/server/services/private-materials'
import type { Membership } from '~~/server/services/sessions'
import type { Database } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import type { FoldedPiece } from '~~/server/work/refold'
import { may } from '#shared/permissions'
import { actBodies } from '#shared/schemas/act'
import type { ActLine } from '#shared/schemas/piece-detail'
import type { FaceWire } from '#shared/schemas/piece-list'

type ActRow = typeof act.$inferSelect
interface Subject { actId: number, partId: number, pieceId: number, doneAt: number }

/**
 * All that was ever told of a piece, the newest doing first: each act as it stands with what it was before it was
 * corrected, those taken back and those moved to other pieces too.
 * @param reader whose history it is read by: it says which acts this person may correct
 */
export function pieceHistory(db: Database, studioId: number, folded: FoldedPiece, reader: Membership, now: number): ActLine[] {
  const partIds = folded.parts.map(each => each.id)
  const chains = readChains(db, studioId, partIds)
  const subjects = readSubjects(db, studioId, chains.flat().map(row => row.id))
  const names = memberNames(db, studioId)
  const sides = facesOfPieces(db, studioId, [folded.piece.id])
  const told = actDetails(db, studioId, folded, chains.flat(), hiddenFrom(db, studioId, may(reader.role, 'see private mixes')))
  const details = (row: ActRow) => ({ ...told(row), on: toldOn(folded, row, subjects.filter(each => each.actId === row.id).map(each => each.partId), sides) })
  const roots = chains.map(chain => rootOf(chain[0]))
  const forecasts = readForecasts(db, studioId, roots)
  const answers = readAnswers(db, studioId, roots)
  const problems = new Map(folded.folded.problems.map(each => [each.actId, each.why]))
  return chains.flatMap((chain): ActLine[] => {
    const [first] = chain
    const last = chain.at(-1)
    if (!first || !last) return []
    const here = (row: ActRow) => subjects.filter(each => each.actId === row.id && each.pieceId === folded.piece.id)
    const doneAt = (row: ActRow) => here(row).reduce((at, each) => Math.max(at, each.doneAt), -Infinity)
    const shown = here(last).length > 0 ? last : [...chain].reverse().find(row => here(row).length > 0) ?? last
    const nameOf = (row: ActRow) => (row.memberId === null ? null : names.get(row.memberId) ?? null)
    const inForce = !last.voided && here(last).length > 0
    return [{
      actId: last.id, rootId: first.id, kind: last.kind, doneAt: doneAt(shown), actDoneAt: last.doneAt, toldAt: first.toldAt, correctedAt: last === first ? null : last.toldAt,
      actor: first.actor, by: nameOf(first), correctedBy: last === first ? null : nameOf(last), detail: details(shown), placeId: (shown.kind === 'moved' || shown.kind === 'back') && typeof shown.body.placeId === 'number' ? shown.body.placeId : null,
      pieceIds: [...new Set(subjects.filter(each => each.actId === last.id).map(each => each.pieceId))],
      inForce, takenBack: last.voided, problem: inForce ? problems.get(first.id) ?? null : null,
      // Taking back repeats the act it takes back, so that one is not a second reading of it.
      was: chain.slice(0, last.voided ? -2 : -1).map(row => ({ doneAt: here(row).length > 0 ? doneAt(row) : row.doneAt, toldAt: row.toldAt, by: nameOf(row), here: here(row).length > 0, detail: details(row) })),
      forecast: forecasts.get(first.id) ?? null, answered: answers.get(first.id) ?? null,
      mayCorrect: inForce && (last.kind in actBodies || (last.kind === 'batch started' && last.doneAt <= now)) && last.doneAt >= now - correctionReach && (may(reader.role, 'correct acts of others') || last.memberId === reader.id),
    }]
  }).sort((a, b) => b.doneAt - a.doneAt || b.rootId - a.rootId)
}

/** Parts and faces that an act outside any schedule was about, by name; none where it was about the whole piece. */
function toldOn({ parts, folded }: FoldedPiece, { kind, body }: ActRow, partIds: readonly number[], sides: readonly FaceWire[]): string[] {
  if ((kind !== 'coat on' && kind !== 'glue-up on') || typeof body.step === 'string') return []
  const own = parts.filter(each => partIds.includes(each.id))
  const faceKeys = Array.isArray(body.faces) ? body.faces : []
  const whole = parts.every(each => partIds.includes(each.id) || folded.joins.some(join => join.partId === each.id))
  return [...whole ? [] : own.map(each => each.name), ...new Set(sides.filter(face => faceKeys.includes(face.key) && partIds.includes(face.partId)).map(face => face.name))]
}

const rootOf = (row: ActRow | undefined) => row?.rootActId ?? row?.id ?? 0

/** The acts that are or were about these parts, each with all its corrections in their order. */
function readChains(db: Database, studioId: number, partIds: number[]): ActRow[][] {
  const touched = db.selectDistinct({ id: act.id, rootId: act.rootActId }).from(actSubject).innerJoin(act, eq(act.id, actSubject.actId))
    .where(scoped(actSubject, studioId, inArray(actSubject.partId, partIds))).all()
  const roots = [...new Set(touched.map(each => each.rootId ?? each.id))]
  const rows = db.select().from(act).where(scoped(act, studioId, or(inArray(act.id, roots), inArray(act.rootActId, roots)))).orderBy(asc(act.id)).all()
  return roots.map(root => rows.filter(row => rootOf(row) === root))
}

function readSubjects(db: Database, studioId: number, actIds: number[]): Subject[] {
  return db.select({ actId: actSubject.actId, partId: actSubject.partId, pieceId: part.pieceId, doneAt: actSubject.doneAt }).from(actSubject).innerJoin(part, eq(part.id, actSubject.partId))
    .where(scoped(actSubject, studioId, inArray(actSubject.actId, actIds))).all()
}

/** What was foretold when a test was made, by the act that first told of it. */
function readForecasts(db: Database, studioId: number, rootIds: number[]): Map<number, NonNullable<ActLine['forecast']>> {
  const rows = db.select({ actId: touchTest.actId, forecast: touchTest.forecast }).from(touchTest).where(scoped(touchTest, studioId, inArray(touchTest.actId, rootIds))).all()
  return new Map(rows.flatMap(({ actId, forecast }) => (forecast === null ? [] : [[actId, { likelyAt: forecast.likelyAt, p90At: forecast.p90At }] as const])))
}

/** What was answered when solvent work was told of, by the act that first told of it. In several rooms the answers are the same. */
function readAnswers(db: Database, studioId: number, rootIds: number[]): Map<number, NonNullable<ActLine['answered']>> {
  const rows = db.select({ actId: vapourStart.actId, exhaust: vapourStart.exhaust, flamesOff: vapourStart.flamesOff, nobodyElse: vapourStart.nobodyElse }).from(vapourStart).where(scoped(vapourStart, studioId, inArray(vapourStart.actId, rootIds))).all()
  return new Map(rows.map(({ actId, ...answered }) => [actId, answered] as const))
}
