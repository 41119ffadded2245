import { chosenHands, handsOf } from '~~/server/planning/hands'
import type { Hands } from '~~/server/planning/hands'
import { indexOf } from '~~/server/planning/fact-index'
import type { PlanFacts } from '~~/server/planning/facts'
import { activityId, handsId, turnIdOf } from '~~/server/planning/ids'
import { lagsOf } from '~~/server/planning/lags'
import type { LagFilm, LagInput, StepWork } from '~~/server/planning/lags'
import { dustApart, dustKeptOff } from '~~/server/planning/dust'
import { openWithout, reservedFor } from '~~/server/planning/reserved'
import { keptOut, operatorOf, refusedWork, vapourApart } from '~~/server/planning/vapour'
import type { WaitsToCome } from '~~/server/planning/waits'
import { minutesFrom } from '#shared/drying/waits'
import { grouped } from '#shared/grouped'
import { freely } from '#shared/planning/objective'
import { planProblem } from '#shared/planning/problem'
import type { PlanInput } from '#shared/planning/problem'
import type { Fixed, PlanProblem } from '#shared/planning/types'
import type { PlaceKind } from '#shared/terms'
import { leavesFilm } from '#shared/step-kinds'
import { studioZone } from '#shared/time'

/** How far ahead a plan looks. */
const horizonDays = 90
/** Starts are given on the quarter of an hour, and nothing is asked for sooner than the next one. */
const quarter = 15 * 60_000

/** Minute 0 of a problem made at `now`, ms UTC: nothing can be planned before it. */
export const zeroOf = (now: number) => Math.ceil(now / quarter) * quarter

type Step = PlanFacts['steps'][number]
type TurnRow = PlanFacts['turns'][number]

/** A problem with what is needed to read its plan back: instants count from `zeroAt`. `films`: what each lag waits for, by its place among them. */
export interface StudioProblem { problem: PlanProblem, zeroAt: number, works: StepWork[], hands: Hands[], untested: Set<number>, leftOut: number[], films: (LagFilm | null)[] }

/** The planner's problem of a studio at `now` (ms UTC): every open turn of every piece that anything but a decision can let begin. */
export function studioProblem(facts: PlanFacts, toCome: WaitsToCome, now: number): StudioProblem {
  const zeroAt = zeroOf(now)
  const hands = handsOf(facts, studioZone(facts.owner.zone), zeroAt, zeroAt + horizonDays * 24 * 60 * 60_000)
  const works = worksOf(facts)
  const index = indexOf(facts)
  const found = byPiece(works).map(own => lagsOf(own, facts, index, toCome, zeroAt))
  const lags = [...found.flatMap(each => each.lags), ...keptOut(works, facts, toCome.shut, hands, zeroAt), ...dustKeptOff(works, facts, zeroAt)]
  const leftOut = follow(new Set([...found.flatMap(each => [...each.unreachable]), ...refusedWork(works, facts)]), works, lags, hands)
  const planned = works.map(work => ({ ...work, turns: work.turns.filter(turn => !leftOut.has(turn.id)) })).filter(work => work.turns.length > 0)
  const known = new Set(planned.flatMap(work => work.turns.map(turn => activityId(turn.id))))
  const held = lags.filter(lag => known.has(lag.to) && (lag.from === null || lag.from === undefined || known.has(lag.from)))
  const asked = [...held, ...begunWith(planned, held, facts, zeroAt)]
  const fixed = fixedOf(planned, facts, toCome, hands, zeroAt)
  const reserved = reservedFor(planned, fixed, familyOf)
  const last = facts.last.filter(entry => entry.startsAt >= zeroAt && known.has(activityId(entry.turnId)))
  const input: PlanInput = {
    activities: planned.flatMap(work => work.turns.map(turn => activity(work.step, turn, handsFor(work, facts, toCome, hands)))),
    resources: [...hands.map(each => ({ id: each.id, capacity: 1, open: openWithout(each.open, reserved.filter(span => span.hand === each.id)) })), ...placesOf(facts)],
    lags: asked,
    rests: restsOf(planned, facts, lags, known),
    apart: [...dustApart(planned, toCome), ...vapourApart(planned, facts, toCome)],
    families: familiesOf(planned),
    jobs: jobsOf(planned, facts, zeroAt),
    fixed,
    horizon: horizonDays * 24 * 60,
    previous: Object.fromEntries(last.map(entry => [activityId(entry.turnId), minutesFrom(zeroAt, entry.startsAt, Math.round)])),
    previousResources: Object.fromEntries(last.flatMap(entry => (entry.memberIds.length === 0 ? [] : [[activityId(entry.turnId), entry.memberIds.map(handsId)]]))),
  }
  // A plan that nobody has heard of is a beginning, not a promise.
  const isHeard = facts.last.some(entry => entry.toldAt !== null)
  return { problem: isHeard ? planProblem(input) : freely(planProblem(input)), zeroAt, works: planned, hands, untested: new Set(found.flatMap(each => [...each.untested])), leftOut: [...leftOut], films: asked.map(lag => lag.film ?? null) }
}

function worksOf(facts: PlanFacts): StepWork[] {
  const turns = grouped(facts.turns, turn => turn.stepId)
  const partOf = new Map(facts.targets.map(target => [target.stepId, target.partId]))
  const roomOf = new Map(facts.stays.map(stay => [stay.partId, stay.roomId]))
  const roomOfPiece = new Map(facts.stays.map(stay => [stay.pieceId, stay.roomId]))
  return facts.steps.flatMap((step) => {
    const own = turns.get(step.id) ?? []
    return own.length === 0 ? [] : [{ step, turns: own, roomId: roomOf.get(partOf.get(step.id) ?? 0) ?? roomOfPiece.get(step.pieceId) ?? null }]
  })
}

function byPiece(works: readonly StepWork[]): StepWork[][] {
  return [...grouped(works, work => work.step.pieceId).values()]
}

/** What waits for a turn that nobody can give a time to has no time either; nor has work that nobody here may do. */
function follow(unreachable: Set<number>, works: readonly StepWork[], lags: readonly LagInput[], hands: readonly Hands[]): Set<number> {
  const out = new Set(unreachable)
  for (const { step, turns } of works) if (step.hands > hands.filter(each => each.may(step.kind)).length) for (const turn of turns) out.add(turn.id)
  if (out.size === 0) return out
  const after = grouped(lags, lag => (lag.from ? turnIdOf(lag.from) : null))
  for (const turn of out) for (const lag of after.get(turn) ?? []) out.add(turnIdOf(lag.to))
  return out
}

/** In a shut room only its equipped operator goes on with the same solvent work. */
function handsFor(work: StepWork, facts: PlanFacts, toCome: WaitsToCome, hands: readonly Hands[]): readonly Hands[] {
  const operator = operatorOf(work, facts, toCome.shut, hands)
  return operator ? [operator] : hands
}

function activity(step: Step, turn: TurnRow, hands: readonly Hands[]): PlanInput['activities'][number] {
  const able = hands.filter(each => each.may(step.kind)).map(each => each.id)
  return { id: activityId(turn.id), minutes: Math.max(1, turn.minutes), uses: {}, choices: step.hands > 0 ? [{ of: able, count: step.hands }] : [], mayRunOver: step.mayRunOver }
}

const placeId = (kind: PlaceKind) => `p ${kind}`

function placesOf(facts: PlanFacts) {
  const kinds = new Map<PlaceKind, number>()
  for (const place of facts.places) kinds.set(place.kind, (kinds.get(place.kind) ?? 0) + place.capacity)
  return [...kinds].map(([kind, capacity]) => ({ id: placeId(kind), capacity }))
}

/** What holds a piece while it rests: clamps until it is out, a rail or a booth until its next step really begins. */
function restsOf(works: readonly StepWork[], facts: PlanFacts, lags: readonly LagInput[], known: ReadonlySet<string>): NonNullable<PlanInput['rests']> {
  const kinds = new Set(facts.places.map(place => place.kind))
  const units = new Map(facts.pieces.map(each => [each.id, each.sizeUnits]))
  const next = grouped(lags, lag => lag.from ?? null)
  return works.flatMap(({ step, turns }): NonNullable<PlanInput['rests']>[number][] => {
    if (step.placeKind === null || !kinds.has(step.placeKind) || !leavesFilm(step.kind)) return []
    const uses = { [placeId(step.placeKind)]: step.hold === null ? units.get(step.pieceId) ?? 1 : 1 }
    const coats = turns.filter(turn => turn.kind === 'work')
    const release = turns.find(turn => turn.kind === 'release')
    const last = coats[coats.length - 1]
    const after = release ? activityId(release.id) : (last && next.get(activityId(last.id))?.find(lag => known.has(lag.to))?.to)
    if (!last) return release ? [{ from: null, to: activityId(release.id), uses }] : []
    return after ? [{ from: activityId(last.id), to: after, uses }] : []
  })
}

/** Like work in one room is set up for and cleaned up after once. */
export const familyOf = ({ step, roomId }: StepWork) => [step.kind, step.materialVersionId ?? step.name, `${step.hands} hands`, step.mayRunOver ? 'may run over' : '', roomId ?? ''].join(' | ')

function familiesOf(works: readonly StepWork[]): NonNullable<PlanInput['families']> {
  const families = new Map<string, { setup: number, cleanup: number, members: string[] }>()
  for (const work of works) {
    if (work.step.setupMin + work.step.cleanMin === 0) continue
    const known = families.get(familyOf(work)) ?? { setup: 0, cleanup: 0, members: [] }
    known.setup = Math.max(known.setup, work.step.setupMin)
    known.cleanup = Math.max(known.cleanup, work.step.cleanMin)
    known.members.push(...work.turns.filter(turn => turn.kind === 'work' && turn.status === 'waiting').map(turn => activityId(turn.id)))
    families.set(familyOf(work), known)
  }
  return [...families].filter(([, family]) => family.members.length > 0).map(([id, family]) => ({ id, ...family, mode: 'row' as const }))
}

/** What waits for nothing is ready with its batch: without this a start put off would cost nothing, and a batch without a date would begin on any day. */
function begunWith(works: readonly StepWork[], lags: readonly LagInput[], facts: PlanFacts, zeroAt: number): LagInput[] {
  const waits = new Set(lags.map(lag => lag.to))
  const startsAt = new Map(facts.pieces.map(each => [each.id, each.startsAt]))
  return works.flatMap(({ step, turns }) => turns.map(turn => activityId(turn.id)).filter(id => !waits.has(id)).map(to => ({ from: null, to, min: releaseOf(startsAt.get(step.pieceId), zeroAt) })))
}

const releaseOf = (startsAt: number | null | undefined, zeroAt: number) => Math.max(0, minutesFrom(zeroAt, startsAt ?? zeroAt, Math.ceil))

/** One job for each batch: like pieces of one job go through their work as a row. */
function jobsOf(works: readonly StepWork[], facts: PlanFacts, zeroAt: number): NonNullable<PlanInput['jobs']> {
  const pieces = new Map(facts.pieces.map(each => [each.id, each]))
  const batches = grouped(works, work => pieces.get(work.step.pieceId)?.batchId ?? 0)
  return [...batches].map(([batchId, own]) => {
    const row = pieces.get(own[0]?.step.pieceId ?? 0)
    return { id: `batch ${batchId}`, activities: own.flatMap(work => work.turns.map(turn => activityId(turn.id))), release: releaseOf(row?.startsAt, zeroAt), due: row?.dueAt ? minutesFrom(zeroAt, row.dueAt, Math.floor) : null, weight: row?.weight ?? 1 }
  })
}

/** Work in hand stays with who is at it, and a pin where somebody put it; whoever the last plan gave it to beside them stays too. */
function fixedOf(works: readonly StepWork[], facts: PlanFacts, toCome: WaitsToCome, hands: readonly Hands[], zeroAt: number): Fixed[] {
  const last = new Map(facts.last.map(entry => [entry.turnId, entry]))
  // Of several pins of one turn the first counts.
  const pins = new Map(facts.pins.filter(pin => pin.startsAt >= zeroAt).reverse().map(pin => [pin.turnId, pin]))
  const after = rowsInHand()
  return works.flatMap(work => work.turns.flatMap((turn): Fixed[] => {
    const { step } = work
    const able = () => handsFor(work, facts, toCome, hands).filter(each => each.may(step.kind)).map(each => each.id)
    const chosen = (memberId: number | null) => chosenHands(able(), [...memberId === null ? [] : [memberId], ...last.get(turn.id)?.memberIds ?? []], step.hands)
    if (turn.status === 'doing' && turn.beganAt !== null) return [{ activity: activityId(turn.id), start: minutesFrom(zeroAt, turn.beganAt, Math.floor) + after(step, turn), resources: chosen(turn.doingMemberId), begun: true }]
    const pinned = pins.get(turn.id)
    return pinned ? [{ activity: activityId(turn.id), start: minutesFrom(zeroAt, pinned.startsAt, Math.round), resources: chosen(pinned.memberId) }] : []
  }))
}

/** A row begun in one go is worked one after the other: how many minutes after its beginning the next of it has its turn. */
function rowsInHand() {
  const worked = new Map<string, number>()
  return (step: StepWork['step'], turn: TurnRow): number => {
    const row = `${step.key} ${turn.beganAt} ${turn.doingMemberId}`
    const before = worked.get(row) ?? 0
    worked.set(row, before + turn.minutes)
    return before
  }
}
