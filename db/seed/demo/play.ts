import { eq } from 'drizzle-orm'
import { finishingSchedule, material, part, piece, planChange, planEntry, ragDuty, studio } from '~~/db/schema'
import type { Calendar } from '~~/db/seed/demo/calendar'
import type { DemoKey } from '~~/db/seed/demo/people'
import type { PlaceKey, Places, RoomKey } from '~~/db/seed/demo/places'
import { atOnce, replan } from '~~/server/planning/replan'
import { recordAct } from '~~/server/services/acts'
import { startBatch } from '~~/server/services/batches'
import { correctAct } from '~~/server/services/corrections'
import { openTin } from '~~/server/services/learned'
import { createMaterial } from '~~/server/services/material-sheets'
import { createMix } from '~~/server/services/mixes'
import { answerRags } from '~~/server/services/rags'
import { pieceStates } from '~~/server/services/piece-states'
import { addReading } from '~~/server/services/readings'
import type { Membership } from '~~/server/services/sessions'
import type { Database } from '~~/server/utils/database'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import { leavesFilm } from '#shared/step-kinds'
import type { ActRequest, CorrectionRequest, TellableKind } from '#shared/schemas/act'
import type { BatchRequest } from '#shared/schemas/batch'
import type { DataSheetBody } from '#shared/schemas/material-edit'
import type { PieceState } from '#shared/schemas/piece-state'
import type { ReadingRequest } from '#shared/schemas/reading'

/** The stage on which the invented weeks are played, through the product's own services and no other way. */
export interface Stage extends Places { db: Database, studioId: number, calendar: Calendar, people: Record<DemoKey, Membership> }

/** One thing that somebody told, at the instant it was told (ms UTC). */
export interface Told { at: number, play: (player: Player) => void | Promise<void> }

export interface Start extends Pick<BatchRequest, 'name' | 'pieces'> {
  at: number
  by?: DemoKey
  schedule: string | null
  place: PlaceKey
  order?: { name: string, dueAt: number }
  oldObject?: boolean
  /** Surface of one piece, m2. */
  areaM2?: number
}

export interface Tell {
  /** When it was done, ms UTC; told `toldAfterMin` later, 3 when not given. */
  at: number
  toldAfterMin?: number
  by?: DemoKey
  batch: string
  kind: TellableKind
  /** Which pieces of the batch, from 1; all of those still here when not given. */
  pieces?: readonly number[]
  /** Part keys; the parts the step is about when not given. */
  parts?: readonly string[]
  body?: ActRequest['body']
  place?: PlaceKey
  /** A name by which a later correction finds the act. */
  label?: string
}

/** A mix of one material of the library and one of the studio's own, in parts by volume. */
export interface HouseMix { at: number, by: DemoKey, name: string, base: { key: string, parts: number }, own: DataSheetBody & { parts: number } }

export interface Correct extends Pick<CorrectionRequest, 'takeBack'> { at: number, by?: DemoKey, label: string, doneAt?: number }

const minute = 60_000
const iso = (at: number) => new Date(at).toISOString()

/** Remembers what the services answered, so that later acts can name it. */
export class Player {
  #keys = 0
  readonly #batches = new Map<string, { pieceIds: readonly number[] }>()
  readonly #acts = new Map<string, number>()

  constructor(readonly stage: Stage) {}

  key(): string {
    this.#keys += 1
    return `demo-${String(this.#keys).padStart(5, '0')}`
  }

  start(given: Start) {
    const { db, studioId, places, people } = this.stage
    const found = given.schedule === null ? null : db.select({ id: finishingSchedule.id }).from(finishingSchedule).where(scoped(finishingSchedule, studioId, eq(finishingSchedule.libraryKey, given.schedule))).get()
    if (found === undefined) throw new Error(`The library has no schedule ${given.schedule}.`)
    const started = this.#done(given.name, startBatch(db, studioId, { member: people[given.by ?? 'maker'] }, {
      clientKey: this.key(), name: given.name, scheduleId: found?.id ?? null, pieces: given.pieces, sizeUnits: 1, areaM2: given.areaM2 ?? 0.08, placeId: places[given.place],
      order: given.order ? { name: given.order.name, dueAt: iso(given.order.dueAt) } : null, startsAt: iso(given.at), oldObject: given.oldObject ?? false,
    }, given.at))
    this.#batches.set(given.name, { pieceIds: started.pieceIds })
  }

  tell(given: Tell) {
    const { db, studioId, places, people } = this.stage
    const rows = this.#pieces(given.batch, given.pieces)
    const request: ActRequest = {
      clientKey: this.key(), kind: given.kind, doneAt: iso(given.at), pieces: rows.map(({ id, version }) => ({ id, version })),
      ...(given.parts ? { partIds: this.#parts(rows.map(row => row.id), given.parts) } : {}),
      body: { ...given.body, ...(given.place ? { placeId: places[given.place] } : {}) },
    }
    const record = (vapour?: ActRequest['vapour']) => recordAct(db, studioId, { member: people[given.by ?? 'maker'] }, { ...request, ...(vapour ? { vapour } : {}) }, toldAt(given))
    const first = record()
    const asked = roomsAsked(first)
    const recorded = this.#done(`${given.batch}, ${given.kind}`, asked ? record({ exhaust: asked.every(room => room.sprayArea) ? 'running' : 'none', flamesOff: true, nobodyElse: true }) : first)
    if (given.label) this.#acts.set(given.label, recorded.actId)
  }

  correct(given: Correct) {
    const { db, studioId, people } = this.stage
    const actId = this.#acts.get(given.label)
    if (actId === undefined) throw new Error(`Nobody has told ${given.label} yet.`)
    this.#done(given.label, correctAct(db, studioId, { member: people[given.by ?? 'maker'] }, actId, {
      clientKey: this.key(), ...(given.takeBack ? { takeBack: true } : {}), ...(given.doneAt === undefined ? {} : { doneAt: iso(given.doneAt) }),
    }, given.at))
  }

  read(room: RoomKey, by: DemoKey, at: number, air: Partial<ReadingRequest>) {
    const { db, studioId, rooms, people } = this.stage
    this.#done(`air of the ${room}`, addReading(db, studioId, people[by].id, rooms[room], { clientKey: this.key(), at: iso(at), tempC: null, rh: null, words: null, same: false, ...air }, at + minute))
  }

  /** Somebody types a data sheet of the studio's own, and mixes it with one of the library's; the studio's own part is private. A tin of the mix is on hand. */
  mix({ at, by, name, base, own }: HouseMix) {
    const { db, studioId, people } = this.stage
    const owner = db.select().from(studio).where(eq(studio.id, studioId)).get()
    const found = db.select({ id: material.id }).from(material).where(scoped(material, studioId, eq(material.libraryKey, base.key))).get()
    if (!owner || !found) throw new Error(`The library has no material ${base.key}.`)
    const { parts, ...sheet } = own
    const kept = this.#done(own.name, createMaterial(db, owner, people[by], sheet, at))
    const mixed = this.#done(name, createMix(db, studioId, people[by], { name, basis: 'volume', parts: [{ materialId: found.id, parts: base.parts, private: false }, { materialId: kept.id, parts, private: true }] }, at))
    const opened = openTin(db, studioId, people[by], mixed.id, at)
    if ('reason' in opened) throw new Error(`The demo's own services refuse a tin of "${name}".`)
  }

  /** Somebody says where the oily rags of a room are, if anybody asks. */
  rags(room: RoomKey, by: DemoKey, at: number, answer: 'flat outdoors' | 'in water can') {
    const { db, studioId, rooms, people } = this.stage
    const open = db.select().from(ragDuty).where(scoped(ragDuty, studioId, eq(ragDuty.roomId, rooms[room]))).all().find(duty => duty.answeredAt === null)
    if (open) this.#done('rags', answerRags(db, studioId, people[by].id, open.id, answer, at))
  }

  /** The studio is planned anew, as it is after every change. */
  async plan(at: number) {
    const { db, studioId } = this.stage
    const planned = await replan(db, studioId, at, atOnce)
    if (!planned.ok) throw new Error(`The demo could not be planned: ${planned.message}`)
  }

  /** Nobody has looked at the last plan yet: what a longer search makes of it is no news to anybody. */
  unheard() {
    const { db, studioId } = this.stage
    db.update(planEntry).set({ toldAt: null }).where(scoped(planEntry, studioId)).run()
    db.delete(planChange).where(scoped(planChange, studioId)).run()
  }

  /** Somebody goes through what was planned and says what has not gone on yet; of one batch nobody speaks. */
  answerSilence(at: number, by: DemoKey, silentBatch: string) {
    const { db, studioId, people } = this.stage
    for (const { batch, step, pieces } of silentSteps(pieceStates(db, studioId, null), at)) {
      if (batch === silentBatch) continue
      const versions = pieceStates(db, studioId, pieces).map(({ id, version }) => ({ id, version }))
      this.#done(`${batch}, not on yet`, recordAct(db, studioId, { member: people[by] }, { clientKey: this.key(), kind: 'not on yet', doneAt: iso(at), pieces: versions, body: { step } }, at))
    }
  }

  #pieces(batch: string, chosen: readonly number[] | undefined) {
    const { db, studioId } = this.stage
    const ids = this.#batches.get(batch)?.pieceIds ?? []
    const rows = ids.flatMap(id => db.select().from(piece).where(owned(piece, studioId, id)).get() ?? [])
    return chosen ? chosen.flatMap(no => rows[no - 1] ?? []) : rows.filter(row => row.goneAt === null)
  }

  #parts(pieceIds: readonly number[], keys: readonly string[]): number[] {
    const { db, studioId } = this.stage
    return pieceIds.flatMap(pieceId => db.select().from(part).where(scoped(part, studioId, eq(part.pieceId, pieceId))).all()).filter(row => keys.includes(row.key)).map(row => row.id)
  }

  /** The story is wrong where a service refuses it, and says so at once. */
  #done<Answer extends { ok: true }>(what: string, answer: Answer | Refusal): Answer {
    if (!answer.ok) throw new Error(`The demo's own services refuse "${what}": ${answer.message}`)
    return answer
  }
}

/** The rooms of which the three questions are asked before solvent work, or null when none are. */
function roomsAsked(answer: { ok: true } | Refusal): { sprayArea: boolean }[] | null {
  const current = answer.ok ? null : answer.current as { ask?: unknown, rooms?: { sprayArea: boolean }[] } | undefined
  return current?.ask === 'vapour' ? current.rooms ?? null : null
}

/** Coats and glue-ups whose planned start has passed in silence, by batch and step. */
function silentSteps(pieces: readonly PieceState[], at: number) {
  const silent = new Map<string, { batch: string, step: string, pieces: number[] }>()
  for (const piece of pieces) {
    for (const { kind, status, step, plan } of piece.turns) {
      if (kind !== 'work' || status !== 'waiting' || !leavesFilm(step.kind) || !plan || plan.dueAt > at) continue
      const known = silent.get(`${piece.batch.id} ${step.key}`) ?? { batch: piece.batch.name, step: step.key, pieces: [] }
      silent.set(`${piece.batch.id} ${step.key}`, { ...known, pieces: [...known.pieces, piece.id] })
    }
  }
  return [...silent.values()]
}

const toldAt = (given: Pick<Tell, 'at' | 'toldAfterMin'>) => given.at + (given.toldAfterMin ?? 3) * minute

export const start = (given: Start): Told => ({ at: given.at, play: player => player.start(given) })
export const tell = (given: Tell): Told => ({ at: toldAt(given), play: player => player.tell(given) })
export const correct = (given: Correct): Told => ({ at: given.at, play: player => player.correct(given) })

/** What one batch goes through, told with its name once. */
export function story(batch: string) {
  const say = (kind: TellableKind, at: number, more: Omit<Tell, 'at' | 'batch' | 'kind'> = {}) => tell({ ...more, at, batch, kind })
  const step = (kind: TellableKind) => (key: string, at: number, more: Omit<Tell, 'at' | 'batch' | 'kind'> = {}) => say(kind, at, { ...more, body: { step: key, ...more.body } })
  return { say, coat: step('coat on'), glue: step('glue-up on'), work: step('work done'), check: step('check done'), turn: step('turned over') }
}
