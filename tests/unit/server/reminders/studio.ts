import { act, batch, callChoice, coat, coatTarget, material, materialVersion, member, openHours, part, person, piece, pieceStep, place, plan, planEntry, planSession, prediction, ragDuty, room, stay, stepLink, stepTarget, studio, subscription, turn } from '~~/db/schema'
import type { Database } from '~~/server/utils/database'
import type { Role } from '#shared/terms'
import { testDatabase } from '../../../helpers/database'

/** Tuesday 2 June 2026, 12:00 in London (11:00 UTC). */
export const noon = Date.UTC(2026, 5, 2, 11)
export const minutes = (count: number) => count * 60_000

type Row = { id: number }
let counter = 0

function actOf(db: Database, studioId: number, kind: 'batch started' | 'coat on', at: number, memberId: number | null): number {
  counter += 1
  const actor = memberId === null ? 'bench' as const : 'member' as const
  return db.insert(act).values({ studioId, clientKey: `key ${counter}`, kind, doneAt: at, toldAt: at, actor, memberId, body: {} }).returning({ id: act.id }).get().id
}

function addMember(db: Database, studioId: number, role: Role, name: string): number {
  const who = db.insert(person).values({ email: `${name}@example.test`, name, passwordHash: 'none' }).returning({ id: person.id }).get()
  return db.insert(member).values({ studioId, personId: who.id, role }).returning({ id: member.id }).get().id
}

/** A studio in London, open 09:00 to 18:00 Monday to Friday, with an owner, a maker and a helper. */
export function openStudio(name = 'Studio') {
  const db: Database = testDatabase()
  const { id: studioId } = db.insert(studio).values({ name, zone: 'Europe/London', madeAt: noon }).returning({ id: studio.id }).get()
  for (let weekday = 1; weekday <= 5; weekday += 1) db.insert(openHours).values({ studioId, weekday, fromMin: 540, toMin: 1080 }).run()
  const owner = addMember(db, studioId, 'owner', 'olive')
  const maker = addMember(db, studioId, 'maker', 'mark')
  const helper = addMember(db, studioId, 'helper', 'hana')
  const { id: roomId } = db.insert(room).values({ studioId, name: 'Bench room', heated: true, nightDropC: 3 }).returning({ id: room.id }).get()
  return { db, studioId, owner, maker, helper, roomId }
}

export type TestStudio = ReturnType<typeof openStudio>

export function subscribe({ db, studioId }: TestStudio, memberId: number, endpoint: string): number {
  return db.insert(subscription).values({ studioId, memberId, endpoint, p256dh: 'key', auth: 'auth', madeAt: noon }).returning({ id: subscription.id }).get().id
}

export function choose({ db, studioId }: TestStudio, memberId: number, kind: string, wanted: boolean): void {
  db.insert(callChoice).values({ studioId, memberId, kind, wanted }).run()
}

/** Oil went on in the room at `at`, by a member or (null) told at the bench. */
export function oil({ db, studioId, roomId }: TestStudio, at: number, memberId: number | null): number {
  const lastOilActId = actOf(db, studioId, 'coat on', at, memberId)
  return db.insert(ragDuty).values({ studioId, roomId, lastOilAt: at, lastOilActId }).returning({ id: ragDuty.id }).get().id
}

/** A batch whose pieces carry one coat of varnish from one act an hour before noon and wait for the second, which may begin from 13:55. */
export function startBatch(test: TestStudio, count: number) {
  const { db, studioId, maker, roomId } = test
  const batchId = db.insert(batch).values({ studioId, name: 'Ledgers', actId: actOf(db, studioId, 'batch started', noon - minutes(120), maker), startsAt: noon }).returning({ id: batch.id }).get().id
  const { id: materialId } = db.insert(material).values({ studioId, name: 'Wood varnish' }).returning({ id: material.id }).get()
  const { id: versionId } = db.insert(materialVersion).values({ studioId, materialId, no: 1, kind: 'varnish', film: 'open', solvent: 'water', cautions: [] }).returning({ id: materialVersion.id }).get()
  const { id: placeId } = db.insert(place).values({ studioId, roomId, name: 'Shelf', kind: 'shelf', capacity: 20 }).returning({ id: place.id }).get()
  const coatAct = actOf(db, studioId, 'coat on', noon - minutes(60), maker)
  const turns: number[] = []
  for (let ordinal = 1; ordinal <= count; ordinal += 1) {
    const { id: pieceId } = db.insert(piece).values({ studioId, batchId, name: `Ledger ${ordinal}`, ordinal }).returning({ id: piece.id }).get()
    const { id: partId } = db.insert(part).values({ studioId, pieceId, key: 'whole', name: 'whole' }).returning({ id: part.id }).get()
    db.insert(stay).values({ studioId, partId, placeId, fromActId: coatAct, fromAt: noon - minutes(120), seenAt: noon }).run()
    const stepOf = (key: string, name: string): Row => db.insert(pieceStep).values({ studioId, pieceId, key, ordinal: key === 'coat-1' ? 1 : 2, name, kind: 'coat', origin: 'schedule', materialVersionId: versionId, status: key === 'coat-1' ? 'resting' : 'waiting', pieceMin: 5, atFront: key === 'coat-2' }).returning({ id: pieceStep.id }).get()
    const first = stepOf('coat-1', 'First coat')
    const second = stepOf('coat-2', 'Second coat')
    const done = db.insert(turn).values({ studioId, stepId: first.id, ordinal: 1, kind: 'work', minutes: 5, status: 'done', doneAt: noon - minutes(60) }).returning({ id: turn.id }).get()
    const { id: coatId } = db.insert(coat).values({ studioId, pieceId, turnId: done.id, actId: coatAct, kind: 'coat', materialVersionId: versionId, beganAt: noon - minutes(65), endedAt: noon - minutes(60), size: 'normal', ground: 'primed' }).returning({ id: coat.id }).get()
    db.insert(coatTarget).values({ studioId, coatId, partId, layer: 1 }).run()
    db.insert(prediction).values({ studioId, coatId, ordinal: 0, milestone: 'ready-to-recoat', likelyAt: noon + minutes(90), p90At: noon + minutes(115), p98At: noon + minutes(130) }).run()
    db.insert(stepLink).values({ studioId, fromStepId: first.id, toStepId: second.id, milestone: 'ready-to-recoat', risk: 'p90' }).run()
    db.insert(stepTarget).values({ studioId, stepId: second.id, partId }).run()
    turns.push(db.insert(turn).values({ studioId, stepId: second.id, ordinal: 1, kind: 'work', minutes: 5 }).returning({ id: turn.id }).get().id)
  }
  return { batchId, turns, coatAct }
}

interface Entry { startsAt: number, lastStartAt?: number | null, firstFew?: number | null, lastStartFewAt?: number | null }

/** A new plan that replaces the last: the given turns in one session. */
export function planTurns({ db, studioId }: TestStudio, turns: readonly number[], entry: Entry): void {
  db.update(plan).set({ current: false }).run()
  const { id: planId } = db.insert(plan).values({ studioId, madeAt: noon, revision: 1, seed: 1, status: 'feasible', objective: {}, clashes: [], current: true }).returning({ id: plan.id }).get()
  const { id: sessionId } = db.insert(planSession).values({ studioId, planId, family: 'varnish', startsAt: entry.startsAt, endsAt: entry.startsAt + minutes(60), setupMin: 5 }).returning({ id: planSession.id }).get()
  for (const turnId of turns) db.insert(planEntry).values({ studioId, planId, turnId, sessionId, ...entry, dueAt: entry.startsAt, endsAt: entry.startsAt + minutes(60) }).run()
}
