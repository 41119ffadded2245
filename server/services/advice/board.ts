import { asc, eq, inArray } from 'drizzle-orm'
import { part, place, stay } from '~~/db/schema'
import type { Asked, Said } from '~~/server/services/advice/films'
import { aboutTurn } from '~~/server/services/advice/soon'
import type { SoonTurn } from '~~/server/services/advice/soon'
import type { Database } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import { roomAirs } from '~~/server/work/air'
import { preparedMaterials } from '~~/server/work/materials'
import { boardMoistureNow, readyForGlue } from '#shared/air/acclimatise'
import type { LainIn } from '#shared/air/acclimatise'
import { airAt } from '#shared/air/room'
import type { RoomTrack } from '#shared/air/room'
import { trackRoom } from '#shared/drying/tools'
import { clockTime, studioZone } from '#shared/time'
import { startAdviceText } from '#shared/words/advice-start'

const hourMs = 60 * 60_000
/** Further back nothing is left of where a part lay. */
const reachMs = 30 * 24 * hourMs
const stepMs = 6 * hourMs

interface Stay { fromAt: number, toAt: number | null, roomId: number }

/** Glue-ups of wood and board that lie far from the moisture they come to rest at in the room: by where they have lain, as far as anybody read the air there. */
export function boardAdvice({ db, owner, now }: Asked, soon: readonly SoonTurn[]): Said[] {
  const joints = soon.filter(({ turn, group }) => turn.step.kind === 'glue-up' && group?.roomId !== null && group !== null)
  if (joints.length === 0) return []
  const stays = staysOf(db, owner.id, joints.map(each => each.pieceId))
  const tracks = new Map([...roomAirs(db, owner, now - reachMs)].map(([roomId, air]) => [roomId, trackRoom(preparedMaterials.tools, air, now)]))
  const zone = studioZone(owner.zone)
  const known = new Map<string, Said | null>()
  return joints.flatMap((each) => {
    const roomId = each.group?.roomId ?? 0
    const lain = each.turn.partIds.map(id => stays.get(id) ?? []).find(own => own.length > 0) ?? []
    const key = JSON.stringify([lain, roomId, each.at])
    if (!known.has(key)) known.set(key, apartAdvice(each, lain, tracks, roomId, at => clockTime(at, { now, zone }), owner.units))
    const said = known.get(key)
    return said ? [{ ...said, ...aboutTurn(each) }] : []
  })
}

function apartAdvice(each: SoonTurn, stays: readonly Stay[], tracks: ReadonlyMap<number, RoomTrack>, roomId: number, when: (at: number) => string, units: 'metric' | 'us'): Said | null {
  const airs = stays.flatMap(own => airsOf(own, tracks, each.at))
  const moisture = boardMoistureNow(airs, each.at)
  const here = tracks.get(roomId)
  if (moisture === null || !here) return null
  // What it comes to rest at: the air of a whole day from then on, so that the hour does not tell.
  const day = Array.from({ length: 4 }, (_, i) => airAt(here, each.at + i * stepMs))
  if (day.some(air => air.assumed)) return null
  const rest = boardMoistureNow([{ fromAt: each.at, tempC: mean(day.map(air => air.tempC)), rh: mean(day.map(air => air.rh)) }], each.at)
  const ready = rest === null ? null : readyForGlue(moisture, rest, each.at)
  return rest === null || ready === null ? null : { ...aboutTurn(each), code: 'acclimatise', text: startAdviceText({ code: 'acclimatise', moisture, rest, when: when(ready) }, units) }
}

const mean = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0) / values.length

/** The air of one stay, every six hours, where somebody had read it. */
function airsOf({ fromAt, toAt, roomId }: Stay, tracks: ReadonlyMap<number, RoomTrack>, until: number): LainIn[] {
  const track = tracks.get(roomId)
  const from = Math.max(fromAt, until - reachMs)
  const to = Math.min(toAt ?? until, until)
  if (!track || from > to) return []
  return Array.from({ length: Math.floor((to - from) / stepMs) + 1 }, (_, i) => from + i * stepMs).flatMap((at) => {
    const air = airAt(track, at)
    return air.assumed ? [] : [{ fromAt: at, tempC: air.tempC, rh: air.rh }]
  })
}

/** Where each part has lain, by part, the oldest stay first. */
function staysOf(db: Database, studioId: number, pieceIds: readonly number[]): Map<number, Stay[]> {
  const rows = db.select({ partId: stay.partId, fromAt: stay.fromAt, toAt: stay.toAt, roomId: place.roomId }).from(stay).innerJoin(place, eq(place.id, stay.placeId)).innerJoin(part, eq(part.id, stay.partId))
    .where(scoped(stay, studioId, inArray(part.pieceId, [...new Set(pieceIds)]))).orderBy(asc(stay.fromAt)).all()
  const stays = new Map<number, Stay[]>()
  for (const { partId, ...row } of rows) stays.set(partId, [...stays.get(partId) ?? [], row])
  return stays
}
