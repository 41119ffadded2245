import { asc, sql } from 'drizzle-orm'
import { plan, planSession, room } from '~~/db/schema'
import { readPlanFacts, studioHours } from '~~/server/planning/facts'
import type { PlanFacts } from '~~/server/planning/facts'
import { memberNames } from '~~/server/services/member-names'
import { movedTurns } from '~~/server/services/plan-moves'
import type { Database } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import { grouped } from '#shared/grouped'
import { openSpans } from '#shared/open-hours'
import { objectiveParts } from '#shared/planning/types'
import type { Objective } from '#shared/planning/types'
import type { PlanBlock, PlanDay, PlanPlace, PlanState, PlanStrip } from '#shared/schemas/plan'
import { addDays, fromLocal, localDate, studioZone, weekdayOf } from '#shared/time'

const minute = 60_000
const daysShown = 7
type Entry = PlanFacts['last'][number]

/** The plan in force as strips for the coming days. `now` in ms UTC; null without a studio. */
export function planState(db: Database, studioId: number, now: number): PlanState | null {
  const facts = readPlanFacts(db, studioId)
  if (!facts) return null
  const current = db.select().from(plan).where(scoped(plan, studioId, sql`${plan.current} = 1`)).get()
  const blocks = blocksOf(db, facts)
  const days = daysOf(facts, blocks, now)
  const until = days[days.length - 1]?.closesAt ?? now
  const names = memberNames(db, studioId)
  const hours = studioHours(facts)
  return {
    at: now, planMadeAt: current?.madeAt ?? null, days,
    people: facts.members.map(({ id }) => ({ memberId: id, name: names.get(id) ?? '', blocks: ofMember(blocks, id, names).filter(block => block.fromAt < until && block.toAt > now) })),
    places: placesOf(db, facts, now, until), moved: movedTurns(db, studioId, now, hours, studioZone(facts.owner.zone)),
    objective: current ? partsOf(current.objective) : null,
  }
}

const partsOf = (kept: Readonly<Record<string, number>>): Objective => Object.fromEntries(objectiveParts.map(part => [part, kept[part] ?? 0])) as unknown as Objective

/** The studio's hours day by day, widened to hold what is planned or in hand outside them. */
function daysOf(facts: PlanFacts, blocks: readonly Pick<PlanBlock, 'fromAt' | 'toAt'>[], now: number): PlanDay[] {
  const zone = studioZone(facts.owner.zone)
  const hours = studioHours(facts)
  return Array.from({ length: daysShown }, (_, ahead): PlanDay => {
    const date = addDays(localDate(now, zone), ahead)
    const [from, to] = [fromLocal(date, 0, zone), fromLocal(addDays(date, 1), 0, zone)]
    const spans = openSpans(hours, zone, from, to)
    const own = blocks.filter(block => block.fromAt < to && block.toAt > from).map(block => ({ fromAt: Math.max(from, block.fromAt), toAt: Math.min(to, block.toAt) }))
    const all = [...spans, ...own]
    const usual = { fromAt: fromLocal(date, 9 * 60, zone), toAt: fromLocal(date, 17 * 60, zone) }
    const [opensAt, closesAt] = all.length === 0 ? [usual.fromAt, usual.toAt] : [Math.min(...all.map(each => each.fromAt)), Math.max(...all.map(each => each.toAt))]
    return { date, weekday: weekdayOf(date), opensAt, closesAt, closed: all.length === 0 }
  })
}

interface Row { entry: Entry, turn: PlanFacts['turns'][number], step: PlanFacts['steps'][number], piece: PlanFacts['pieces'][number], pin: PlanFacts['pins'][number] | undefined }

type Block = Omit<PlanBlock, 'with'> & { memberIds: number[] }

/** What takes somebody's hands, with the names of those whose hands it takes as well. */
const ofMember = (blocks: readonly Block[], memberId: number, names: ReadonlyMap<number, string>): PlanBlock[] => blocks.flatMap(({ memberIds, ...block }) => (
  memberIds.includes(memberId) ? [{ ...block, with: memberIds.flatMap(id => (id === memberId ? [] : names.get(id) ?? [])) }] : []))

/** Sessions, what is pinned in one go, and like acts straight after one another: each one block. */
function blocksOf(db: Database, facts: PlanFacts): Block[] {
  const sessions = new Map(db.select().from(planSession).where(scoped(planSession, facts.owner.id)).all().map(each => [each.id, each]))
  const blocks = rowsOf(facts).reduce<Row[][]>((found, row) => {
    const last = found.find(rows => joins(rows, row))
    if (last) last.push(row)
    else found.push([row])
    return found
  }, [])
  return blocks.flatMap((rows): Block[] => {
    const [first] = rows
    if (!first) return []
    const session = sessions.get(first.entry.sessionId ?? 0)
    const [workAt, endsAt] = [first.entry.startsAt, Math.max(...rows.map(row => row.entry.endsAt))]
    const ready = rows.flatMap(row => row.entry.readyAt ?? [])
    return [{
      key: `b${first.turn.id}`, memberId: first.entry.memberId, memberIds: first.entry.memberIds, turnIds: rows.map(row => row.turn.id), pieces: [...new Set(rows.map(row => row.piece.name))], kind: first.turn.kind, stepKind: first.step.kind, step: first.turn.name || first.step.name, batch: first.piece.batch,
      fromAt: session?.startsAt ?? workAt, toAt: session?.endsAt ?? endsAt, workAt, readyAt: ready.length > 0 ? Math.max(...ready) : null, pinId: first.pin?.id ?? null, doing: first.turn.status === 'doing', lastStartAt: first.entry.lastStartAt,
    }]
  })
}

function rowsOf(facts: PlanFacts): Row[] {
  const turns = new Map(facts.turns.map(turn => [turn.id, turn]))
  const steps = new Map(facts.steps.map(step => [step.id, step]))
  const pieces = new Map(facts.pieces.map(piece => [piece.id, piece]))
  return [...facts.last].sort((a, b) => a.startsAt - b.startsAt || a.turnId - b.turnId).flatMap((entry) => {
    const turn = turns.get(entry.turnId)
    const step = turn && steps.get(turn.stepId)
    const piece = step && pieces.get(step.pieceId)
    return piece ? [{ entry, turn, step, piece, pin: facts.pins.find(each => each.turnId === turn.id && each.startsAt === entry.startsAt) }] : []
  })
}

function joins(rows: readonly Row[], row: Row): boolean {
  const [first, last] = [rows[0], rows[rows.length - 1]]
  if (!first || !last || String(first.entry.memberIds) !== String(row.entry.memberIds) || (first.pin?.madeAt ?? null) !== (row.pin?.madeAt ?? null)) return false
  if (first.entry.sessionId !== null || row.entry.sessionId !== null) return first.entry.sessionId === row.entry.sessionId
  return first.step.name === row.step.name && first.turn.kind === row.turn.kind && first.turn.status === row.turn.status && row.entry.startsAt <= last.entry.endsAt + minute
}

function placesOf(db: Database, facts: PlanFacts, now: number, until: number): PlanPlace[] {
  const rooms = new Map(db.select({ id: room.id, name: room.name }).from(room).where(scoped(room, facts.owner.id)).orderBy(asc(room.sort)).all().map(row => [row.id, row.name]))
  const holds = grouped(stripsOf(facts, now), strip => strip.placeId)
  return facts.places.map((place): PlanPlace => ({
    placeId: place.id, name: place.name, kind: place.kind, room: rooms.get(place.roomId) ?? '', capacity: place.capacity,
    strips: alike((holds.get(place.id) ?? []).filter(hold => hold.fromAt < until && (hold.toAt ?? Infinity) > now)),
  }))
}

interface Hold { placeId: number, pieceId: number, name: string, batchId: number, units: number, fromAt: number, toAt: number | null, dryAt: number | null, lies: boolean }

/** One strip for each piece at each place: its parts there lie together. */
function stripsOf(facts: PlanFacts, now: number): Hold[] {
  const pieceOf = new Map([...facts.stays].map(stay => [stay.partId, stay.pieceId]))
  const pieces = new Map(facts.pieces.map(piece => [piece.id, piece]))
  const rows = grouped(rowsOf(facts), row => row.piece.id)
  const here = new Set(facts.stays.map(stay => `${stay.partId} ${stay.placeId}`))
  return [...grouped(facts.lastHolds, hold => `${pieceOf.get(hold.partId) ?? 0} ${hold.placeId} ${hold.fromAt}`).values()].flatMap((own): Hold[] => {
    const [first] = own
    const piece = first && pieces.get(pieceOf.get(first.partId) ?? 0)
    if (!piece) return []
    const toAt = own.some(hold => hold.toAt === null) ? null : Math.max(...own.map(hold => hold.toAt ?? 0))
    const lies = first.fromAt <= now && own.some(hold => here.has(`${hold.partId} ${hold.placeId}`))
    const next = (rows.get(piece.id) ?? []).find(row => row.entry.startsAt >= (toAt ?? first.fromAt))
    return [{ placeId: first.placeId, pieceId: piece.id, name: piece.name, batchId: piece.batchId, units: piece.sizeUnits, fromAt: first.fromAt, toAt, dryAt: next?.entry.readyAt ?? null, lies }]
  })
}

const coarse = 3 * 60 * minute
const about = (at: number | null) => at === null ? null : Math.round(at / coarse)

/** Pieces of one batch that come and go within three hours of each other are one strip, as long as all of them lie: the earliest coming, the latest drying and going. */
function alike(holds: readonly Hold[]): PlanStrip[] {
  return [...grouped(holds, hold => JSON.stringify([hold.batchId, about(hold.fromAt), about(hold.toAt)])).values()].map((own): PlanStrip => {
    const [first] = own as [Hold]
    return {
      key: `${first.pieceId} ${first.fromAt}`, pieces: own.map(each => each.name), units: own.reduce((sum, each) => sum + each.units, 0), fromAt: Math.min(...own.map(each => each.fromAt)),
      toAt: own.some(each => each.toAt === null) ? null : Math.max(...own.map(each => each.toAt ?? 0)), dryAt: own.some(each => each.dryAt !== null) ? Math.max(...own.map(each => each.dryAt ?? 0)) : null, lies: own.every(each => each.lies),
    }
  }).sort((a, b) => a.fromAt - b.fromAt)
}
