import { and, asc, eq, inArray, isNull } from 'drizzle-orm'
import { carrier, coat, intake, materialVersion, member, part, piece, pieceStep, place, room, stay, studio, vapourLimit } from '~~/db/schema'
import { cautionsWith } from '~~/server/services/cautions'
import { intakeCautions } from '~~/server/services/intake-cautions'
import type { StudioRow } from '~~/server/services/sessions'
import type { Database } from '~~/server/utils/database'
import { absent } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { scoped } from '~~/server/utils/scoped'
import { grouped } from '#shared/grouped'
import type { TagFound, TagsState, TagWire } from '#shared/schemas/tag'
import { readTagCode } from '#shared/tag-code'
import { tagMistake, tagRefusals } from '#shared/words/tags'

interface Standing { pieceId: number, name: string, placeId: number, carrierId: number | null }

/** Everything in the studio that stands somewhere, in the order of the pieces. */
const findStanding = (db: Database, studioId: number): Standing[] =>
  db.selectDistinct({ pieceId: piece.id, name: piece.name, placeId: stay.placeId, carrierId: stay.carrierId }).from(piece)
    .innerJoin(part, eq(part.pieceId, piece.id)).innerJoin(stay, and(eq(stay.partId, part.id), isNull(stay.toAt)))
    .where(scoped(piece, studioId, isNull(piece.goneAt))).orderBy(asc(piece.id)).all()

/** The cautions of each piece: of what lies on it unsettled, of what is still to come, and of what nobody has tested about an old object. */
export function cautionsByPiece(db: Database, studioId: number, pieceIds: readonly number[]): Map<number, string[]> {
  const ids = [...new Set(pieceIds)]
  if (ids.length === 0) return new Map()
  const said = { cautions: materialVersion.cautions, solvent: materialVersion.solvent, solventKey: vapourLimit.solventKey }
  const on = db.selectDistinct({ pieceId: coat.pieceId, ...said }).from(coat).innerJoin(materialVersion, eq(materialVersion.id, coat.materialVersionId)).leftJoin(vapourLimit, eq(vapourLimit.materialId, materialVersion.materialId))
    .where(scoped(coat, studioId, inArray(coat.pieceId, ids), isNull(coat.settledAt), isNull(coat.strippedAt))).all()
  const ahead = db.selectDistinct({ pieceId: pieceStep.pieceId, ...said }).from(pieceStep).innerJoin(materialVersion, eq(materialVersion.id, pieceStep.materialVersionId)).leftJoin(vapourLimit, eq(vapourLimit.materialId, materialVersion.materialId))
    .where(scoped(pieceStep, studioId, inArray(pieceStep.pieceId, ids), inArray(pieceStep.status, ['waiting', 'doing', 'resting', 'set aside']))).all()
  const old = db.select({ pieceId: intake.pieceId, question: intake.question, answer: intake.answer }).from(intake).where(scoped(intake, studioId, inArray(intake.pieceId, ids))).all()
  const keys = [
    ...old.flatMap(({ pieceId, question, answer }) => answer === 'tested, none' ? [] : [{ pieceId, key: intakeCautions[question] as string }]),
    ...[...on, ...ahead].flatMap(row => cautionsWith(row).map(key => ({ pieceId: row.pieceId, key }))),
  ]
  return new Map([...grouped(keys, each => each.pieceId)].map(([pieceId, own]) => [pieceId, [...new Set(own.map(each => each.key))]]))
}

type RoomRow = Pick<typeof room.$inferSelect, 'id' | 'name' | 'sprayArea' | 'sleptIn'>

/** What a room asks of whoever stands at one of its shelves, whatever stands there. */
const ofRoom = ({ sprayArea, sleptIn }: Pick<RoomRow, 'sprayArea' | 'sleptIn'>) => [...sprayArea ? ['flames', 'phones'] : [], ...sleptIn ? ['sleeping room'] : []]

function readTags(db: Database, studioId: number): TagWire[] {
  const standing = findStanding(db, studioId)
  const cautions = cautionsByPiece(db, studioId, standing.map(each => each.pieceId))
  const rooms = db.select({ id: room.id, name: room.name, sprayArea: room.sprayArea, sleptIn: room.sleptIn }).from(room).where(scoped(room, studioId)).orderBy(asc(room.sort), asc(room.id)).all()
  const places = db.select().from(place).where(scoped(place, studioId)).orderBy(asc(place.sort), asc(place.id)).all()
  const says = (own: readonly Standing[], its: RoomRow | null) => ({
    pieces: [...new Set(own.map(each => each.name))],
    cautions: [...new Set([...its ? ofRoom(its) : [], ...own.flatMap(each => cautions.get(each.pieceId) ?? [])])],
  })
  return [
    ...rooms.flatMap(its => places.filter(each => each.roomId === its.id).map((row): TagWire => ({
      kind: 'place', id: row.id, code: row.code, name: row.name, room: { id: its.id, name: its.name }, ...says(standing.filter(each => each.placeId === row.id), its),
    }))),
    ...db.select().from(carrier).where(scoped(carrier, studioId)).orderBy(asc(carrier.name), asc(carrier.id)).all().map((row): TagWire => ({
      kind: 'carrier', id: row.id, code: row.code, name: row.name, room: null, ...says(standing.filter(each => each.carrierId === row.id), null),
    })),
  ]
}

/** Everything of the studio that can carry a tag, room by room, then the carriers. `now` in ms UTC. */
export function tagsState(db: Database, owner: StudioRow, address: string | null, now: number): TagsState {
  return { at: now, studio: owner.name, address, tags: readTags(db, owner.id) }
}

/** What carries a code: here, or in another studio that the person belongs to. A studio they do not belong to is not told from none. */
export function findTag(db: Database, owner: StudioRow, personId: number, typed: string): TagFound | Refusal {
  const read = readTagCode(typed)
  if (!('code' in read)) return absent(tagMistake(read))
  const { code } = read
  const here = readTags(db, owner.id).find(each => each.code === code)
  if (here) return { kind: here.kind, id: here.id, code, name: here.name, room: here.room, cautions: here.cautions }
  const others = db.select({ studioId: studio.id, studio: studio.name }).from(member).innerJoin(studio, eq(studio.id, member.studioId)).where(and(eq(member.personId, personId), isNull(member.leftAt))).all()
  const elsewhere = others.find(each => each.studioId !== owner.id && readTags(db, each.studioId).some(tag => tag.code === code))
  return elsewhere ? { kind: 'elsewhere', ...elsewhere } : absent(tagRefusals.noSuchTag(code))
}
