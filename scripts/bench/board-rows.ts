import { eq } from 'drizzle-orm'
import { chanceFrom } from './chance'
import { act, batch, coat, coatTarget, face, material, materialVersion, member, part, person, piece, pieceStep, place, plan, planEntry, planSession, prediction, reading, room, stay, stepLink, stepTarget, studio, turn, windowPrediction } from '~~/db/schema'
import { seedLibrary } from '~~/db/seed/library'
import type { Database, Transaction } from '~~/server/utils/database'

const minute = 60_000
const hour = 60 * minute
const day = 24 * hour
const rungs = ['set-to-touch', 'dust-free', 'tack-free', 'dry-to-handle', 'dry-to-sand-lightly', 'ready-to-recoat', 'cured'] as const
/** Of the coats of a piece so many can still change an answer; the rest have settled. */
const liveCoats = 2
const roomNames = ['Front bench', 'Long room', 'Yard']

export interface BoardSize { pieces: number, places: number, coats: number, now: number, seed: number }
interface Ground extends BoardSize { tx: Transaction, studioId: number, memberId: number, versionId: number, planId: number, actId: number, placeIds: number[], chance: () => number }

const idOf = (row: { id: number }) => row.id

function ground(tx: Transaction, size: BoardSize): Ground {
  const { now } = size
  const chance = chanceFrom(size.seed)
  const studioId = idOf(tx.insert(studio).values({ name: 'Bench studio', zone: 'Europe/Lisbon', madeAt: now - 90 * day }).returning().get())
  const personId = idOf(tx.insert(person).values({ email: 'bench@example.test', name: 'Wren', passwordHash: 'none' }).returning().get())
  const memberId = idOf(tx.insert(member).values({ studioId, personId, role: 'owner' }).returning().get())
  seedLibrary(tx, studioId)
  const versionId = tx.select({ id: materialVersion.id }).from(materialVersion).innerJoin(material, eq(material.id, materialVersion.materialId)).where(eq(materialVersion.solvent, 'water')).get()?.id ?? 0
  const roomIds = roomNames.map((name, sort) => idOf(tx.insert(room).values({ studioId, name, sort, heated: sort < 2, outdoor: sort === 2, nightDropC: 3 }).returning().get()))
  for (const roomId of roomIds) tx.insert(reading).values(Array.from({ length: 28 }, (_, i) => ({ studioId, roomId, at: now - i * 6 * hour, toldAt: now - i * 6 * hour, tempC: 16 + chance() * 6, rh: 0.4 + chance() * 0.3, source: 'note' as const }))).run()
  const placeIds = Array.from({ length: size.places }, (_, i) => idOf(tx.insert(place).values({ studioId, roomId: roomIds[i % roomIds.length]!, name: `Shelf ${i + 1}`, kind: i % 10 === 9 ? 'rail' : 'shelf', capacity: Math.ceil(size.pieces / size.places) + 2, sort: i }).returning().get()))
  const planId = idOf(tx.insert(plan).values({ studioId, madeAt: now, revision: 1, seed: 1, status: 'feasible', objective: {}, clashes: [], current: true }).returning().get())
  const actId = idOf(tx.insert(act).values({ studioId, clientKey: 'batch started', kind: 'batch started', doneAt: now - 40 * day, toldAt: now - 40 * day, actor: 'member', memberId, body: {} }).returning().get())
  return { ...size, tx, studioId, memberId, versionId, planId, actId, placeIds, chance }
}

/** A step that is done, with its turn: what ten coats leave behind. */
function step(g: Ground, pieceId: number, partId: number, no: number, front: boolean): { stepId: number, turnId: number } {
  const { tx, studioId } = g
  const status = front ? 'waiting' as const : 'done' as const
  const stepId = idOf(tx.insert(pieceStep).values({ studioId, pieceId, key: `coat ${no}`, ordinal: no, name: `Coat ${no}`, kind: 'coat', origin: 'schedule', materialVersionId: g.versionId, status, setupMin: 5, pieceMin: 4, cleanMin: 5, atFront: front }).returning({ id: pieceStep.id }).get())
  tx.insert(stepTarget).values({ studioId, stepId, partId }).run()
  const turnId = idOf(tx.insert(turn).values({ studioId, stepId, ordinal: 1, kind: 'work', minutes: 4, status, doneAt: front ? null : g.now - hour }).returning({ id: turn.id }).get())
  return { stepId, turnId }
}

function film(g: Ground, at: { pieceId: number, partId: number, faceId: number, turnId: number, layer: number, endedAt: number, settled: boolean }) {
  const { tx, studioId } = g
  const { pieceId, partId, faceId, turnId, layer, endedAt } = at
  const actId = idOf(tx.insert(act).values({ studioId, clientKey: `coat ${pieceId} ${layer}`, kind: 'coat on', doneAt: endedAt, toldAt: endedAt, actor: 'member', memberId: g.memberId, body: {} }).returning({ id: act.id }).get())
  const coatId = idOf(tx.insert(coat).values({ studioId, pieceId, turnId, actId, kind: 'coat', materialVersionId: g.versionId, beganAt: endedAt - 4 * minute, endedAt, size: 'normal', ground: 'primed', settledAt: at.settled ? endedAt + day : null }).returning({ id: coat.id }).get())
  tx.insert(coatTarget).values({ studioId, coatId, partId, faceId, layer }).run()
  const times = (ordinal: number) => endedAt + Math.round((ordinal + 1) ** 2 * 12 * minute * (0.8 + g.chance() * 0.4))
  tx.insert(prediction).values(rungs.map((milestone, ordinal) => ({ studioId, coatId, ordinal, milestone, likelyAt: times(ordinal), p90At: times(ordinal) + hour / 2, p98At: times(ordinal) + hour }))).run()
  tx.insert(windowPrediction).values({ studioId, coatId, ordinal: 0, opensAt: endedAt + 4 * hour, shutsAt: endedAt + 2 * day }).run()
}

function pieceWithCoats(g: Ground, batchId: number, name: string, ordinal: number, placeId: number, sessionId: number) {
  const { tx, studioId, coats, now } = g
  const pieceId = idOf(tx.insert(piece).values({ studioId, batchId, name, ordinal, stepsDone: coats, stepsOf: coats + 1 }).returning({ id: piece.id }).get())
  const partId = idOf(tx.insert(part).values({ studioId, pieceId, key: 'whole', name: 'whole' }).returning({ id: part.id }).get())
  const faceId = idOf(tx.insert(face).values({ studioId, partId, key: 'front', name: 'front' }).returning({ id: face.id }).get())
  tx.insert(stay).values({ studioId, partId, placeId, fromActId: g.actId, fromAt: now - 40 * day, seenAt: now - hour }).run()
  let before = 0
  for (let no = 1; no <= coats; no++) {
    const { stepId, turnId } = step(g, pieceId, partId, no, false)
    film(g, { pieceId, partId, faceId, turnId, layer: no, endedAt: now - (coats - no) * day - Math.round(g.chance() * 6 * hour), settled: no <= coats - liveCoats })
    if (before > 0) tx.insert(stepLink).values({ studioId, fromStepId: before, toStepId: stepId, milestone: 'ready-to-recoat', risk: 'p90', windowed: true }).run()
    before = stepId
  }
  const next = step(g, pieceId, partId, coats + 1, true)
  tx.insert(stepLink).values({ studioId, fromStepId: before, toStepId: next.stepId, milestone: 'ready-to-recoat', risk: 'p90', windowed: true }).run()
  tx.insert(planEntry).values({ studioId, planId: g.planId, turnId: next.turnId, sessionId, memberId: g.memberId, startsAt: now + 3 * hour, endsAt: now + 4 * hour, dueAt: now + 3 * hour, lastStartAt: now + 5 * hour }).run()
}

/** Fills an empty database with a studio whose board is full: rows as the services leave them, predictions and a plan too. */
export function fillBoard(db: Database, size: BoardSize) {
  return db.transaction((tx) => {
    const g = ground(tx, size)
    const perBatch = 12
    for (let first = 0; first < size.pieces; first += perBatch) {
      const count = Math.min(perBatch, size.pieces - first)
      const no = first / perBatch + 1
      const batchId = idOf(tx.insert(batch).values({ studioId: g.studioId, name: `Batch ${no}`, actId: g.actId, startsAt: size.now - 40 * day }).returning().get())
      const sessionId = idOf(tx.insert(planSession).values({ studioId: g.studioId, planId: g.planId, family: `coat ${no}`, startsAt: size.now + 3 * hour, endsAt: size.now + 4 * hour, setupMin: 5 }).returning().get())
      for (let i = 0; i < count; i++) pieceWithCoats(g, batchId, `Ledger ${first + i + 1}`, i + 1, g.placeIds[Math.floor((first + i) * size.places / size.pieces)]!, sessionId)
    }
    const owner = tx.select().from(studio).where(eq(studio.id, g.studioId)).get()
    if (!owner) throw new Error('The bench studio was not written.')
    return { studio: owner, coats: size.pieces * size.coats, live: size.pieces * Math.min(liveCoats, size.coats) }
  })
}
