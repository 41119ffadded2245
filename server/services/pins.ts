import { and, eq, inArray } from 'drizzle-orm'
import { pin, turn } from '~~/db/schema'
import { clashSentences } from '~~/server/planning/clashes'
import { readPlanFacts } from '~~/server/planning/facts'
import type { PlanFacts } from '~~/server/planning/facts'
import { chosenHands } from '~~/server/planning/hands'
import { activityId, handsId, memberIdOf } from '~~/server/planning/ids'
import { pinClash } from '~~/server/planning/pin-check'
import type { PinStudio, Wanted } from '~~/server/planning/pin-check'
import { studioProblem } from '~~/server/planning/problem'
import type { Search } from '~~/server/planning/search'
import { WaitsToCome } from '~~/server/planning/waits'
import { memberNames } from '~~/server/services/member-names'
import { change } from '~~/server/utils/change'
import type { Database, Transaction } from '~~/server/utils/database'
import { absent, conflict, impossible, isRefusal } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import type { PinBody } from '#shared/schemas/pin'
import { studioZone } from '#shared/time'
import { pinWords } from '#shared/words/pins'

const minute = 60_000
/** Long enough for a first plan; the best one is made afterwards. */
const trial = { millis: 120, schedules: 3 } as const

/** Times that break no rule, with the zero they count from, ms UTC. */
interface CheckedPin { ok: true, zeroAt: number, wanted: Wanted[] }

/**
 * Whether some turns may have a time of their own, one after another. Refused with the sentence that names the clash where it breaks a rule
 * by itself or leaves something else without a start. Nothing is kept.
 * @param now ms UTC
 */
export async function checkPin(db: Database, studioId: number, body: PinBody, now: number, search: Search): Promise<CheckedPin | Refusal> {
  const names = memberNames(db, studioId)
  const refusal = notWaiting(db, studioId, body.turnIds) ?? (body.memberId === null || names.has(body.memberId) ? null : absent())
  const read = readPlanFacts(db, studioId)
  if (refusal || !read) return refusal ?? absent()
  const facts: PlanFacts = { ...read, pins: read.pins.filter(each => !body.turnIds.includes(each.turnId)) }
  const toCome = new WaitsToCome(db, facts, now)
  const given = studioProblem(facts, toCome, now)
  const studio: PinStudio = { facts, given, toCome, names, clock: { now, zone: studioZone(facts.owner.zone) } }
  const startsAt = Date.parse(body.startsAt)
  if (startsAt < given.zeroAt) return impossible(pinWords.past(given.zeroAt, studio.clock), { startsAt: pinWords.past(given.zeroAt, studio.clock) })
  const wanted = wishes(studio, body, startsAt)
  if (wanted === null) return impossible(pinWords.notPlanned)
  const unable = unableAt(studio, body.memberId, wanted)
  if (unable !== null) return impossible(unable, { memberId: unable })
  const clash = pinClash(studio, wanted) ?? await trialClash(studio, wanted, search)
  return clash === null ? { ok: true, zeroAt: given.zeroAt, wanted } : impossible(clash, { startsAt: clash })
}

/** The sentence for somebody who was asked for and may not do one of the steps. */
function unableAt({ given, names }: PinStudio, memberId: number | null, wanted: readonly Wanted[]): string | null {
  if (memberId === null) return null
  const other = wanted.find(each => each.hands.length > 0 && !each.hands.includes(handsId(memberId)))
  const work = other && given.works.find(each => each.turns.some(turn => turn.id === other.turnId))
  return work ? pinWords.notAble(names.get(memberId) ?? '', work.step.name) : null
}

/** Turns that are not there, or that somebody has begun. */
function notWaiting(db: Database | Transaction, studioId: number, turnIds: readonly number[]): Refusal | null {
  const known = db.select({ status: turn.status }).from(turn).where(scoped(turn, studioId, inArray(turn.id, [...turnIds]))).all()
  if (known.length < new Set(turnIds).size) return absent()
  return known.some(each => each.status !== 'waiting') ? conflict(pinWords.begun) : null
}

/**
 * Gives some turns a time of their own, one after another, once that has been checked.
 * @param now ms UTC
 */
export async function pinTurns(db: Database, studioId: number, memberId: number, body: PinBody, now: number, checked: () => Promise<CheckedPin | Refusal>): Promise<{ ok: true } | Refusal> {
  const found = await checked()
  if (isRefusal(found)) return found
  const { wanted, zeroAt } = found
  return change(db, studioId, 'work', (tx): { ok: true } | Refusal => {
    // Somebody may have begun while it was being checked.
    const refusal = notWaiting(tx, studioId, body.turnIds)
    if (refusal) return refusal
    tx.delete(pin).where(scoped(pin, studioId, inArray(pin.turnId, body.turnIds))).run()
    tx.insert(pin).values(wanted.map(each => ({ studioId, turnId: each.turnId, startsAt: zeroAt + each.start * minute, memberId: memberOf(each.hands), madeAt: now, madeByMemberId: memberId }))).run()
    return { ok: true }
  })
}

/** The turns in a row from an instant on, in the order the plan has them, with the hands it gave them or those asked for; null when one of them has no place in the plan. */
function wishes({ facts, given }: PinStudio, { turnIds, memberId }: PinBody, startsAt: number): Wanted[] | null {
  const last = new Map(facts.last.map(entry => [entry.turnId, entry]))
  const order = [...new Set(turnIds)].sort((a, b) => (last.get(a)?.startsAt ?? 0) - (last.get(b)?.startsAt ?? 0) || a - b)
  let start = Math.round((startsAt - given.zeroAt) / minute)
  const found = order.map((turnId): Wanted | null => {
    const activity = given.problem.activities.find(each => each.id === activityId(turnId))
    if (!activity) return null
    const wished = [...memberId === null ? [] : [memberId], ...last.get(turnId)?.memberIds ?? []]
    const hands = chosenHands(activity.choices[0]?.of ?? [], wished, activity.choices[0]?.count ?? 0)
    const each = { turnId, start, end: start + activity.minutes, hands }
    start = each.end
    return each
  })
  return found.includes(null) ? null : found.flatMap(each => each ?? [])
}

/** What else would be left without a start, or miss its window, were it so. */
async function trialClash({ facts, given, toCome, clock: { now } }: PinStudio, wanted: readonly Wanted[], search: Search): Promise<string | null> {
  const pins = wanted.map(({ turnId, start, hands }) => ({ id: 0, studioId: facts.owner.id, turnId, startsAt: given.zeroAt + start * minute, memberId: memberOf(hands), actId: null, madeAt: null, madeByMemberId: null }))
  const pinned = studioProblem({ ...facts, pins: [...facts.pins, ...pins] }, toCome, now)
  const before = await search('before', given.problem, trial)
  const after = await search('after', pinned.problem, trial)
  if (!before.ok || !after.ok) return pinWords.noPlanWithIt
  const known = new Set(clashSentences(before.plan, given))
  return clashSentences(after.plan, pinned).find(each => !known.has(each)) ?? null
}

const memberOf = (hands: readonly string[]) => (hands[0] ? memberIdOf(hands[0]) : null)

/** Lets turns go again that were pinned together with this one. */
export function unpin(db: Database, studioId: number, id: number): { ok: true } | Refusal {
  return change(db, studioId, 'work', (tx): { ok: true } | Refusal => {
    const row = tx.select().from(pin).where(owned(pin, studioId, id)).get()
    if (!row) return absent()
    tx.delete(pin).where(row.madeAt === null ? owned(pin, studioId, id) : and(scoped(pin, studioId, eq(pin.madeAt, row.madeAt)))).run()
    return { ok: true }
  })
}
