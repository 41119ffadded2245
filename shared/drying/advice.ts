import type { Advice, CoatCase, CoatPrediction } from '#shared/drying/types'
import type { AirSpan, Climb } from '#shared/drying/ladder'
import { usualHazeGapC } from '#shared/drying/haze'
import { dampCeiling, inSpans } from '#shared/drying/refusals'
import { firstCold, firstThinDewMargin } from '#shared/drying/spells'
import { lastBefore, trackDewPoint, trackTemp } from '#shared/air/room'
import { ratioOfVapour, tabledDewPoint, tabledSaturation } from '#shared/air/tables'
import { localDay, localTimeOfDay } from '#shared/air/zone'
import type { AdviceFacts } from '#shared/words/advice'
import { adviceText, whenText } from '#shared/words/advice'

/** How long an oxidising film had better not be covered (a maker of tung-oil varnish: not within a day, better two). */
const openForMs = 48 * 3_600_000
/** Coat and ground together slower than this are outside what anybody has measured. */
const measuredSlowness = 3

/** `hazeGapC`: gap to the dew point under which the material has been seen to haze here, kelvin; absent while nobody has seen any. */
interface Asked { way: Climb, coat: CoatCase, spans: readonly AirSpan[], prediction: CoatPrediction, now: number, hazeGapC?: number }

function spanAt(spans: readonly AirSpan[], at: number): AirSpan {
  return spans.findLast(s => s.fromAt <= at) ?? spans[0]!
}

function said(span: AirSpan, at: number, now: number): string {
  const { zone } = span.clock.track
  return whenText(localDay(zone, at), Math.floor(localTimeOfDay(zone, at) / 60_000), localDay(zone, now))
}

/**
 * A joint needs its warmth for longer than its clamps: the first cold after it is out of them and before it has its strength (C16: look at
 * the night ahead, not at the moment). Only what is still to come: a joint that kept together through a cold night has shown so.
 */
function coldStrength({ way, spans, prediction, now }: Asked): AdviceFacts[] {
  const { minTempC } = way.material.material
  const strength = prediction.milestones.find(m => m.name === 'full-strength')
  if (minTempC === null || !strength || strength.reachedAt !== null) return []
  const until = strength.likelyAt ?? Infinity
  const from = Math.max(now, way.appliedAt)
  const at = from < until ? inSpans(spans, from, until, 0, (span, start) => firstCold(span.clock, minTempC, start)) : Infinity
  return at < until ? [{ code: 'cold-before-strength', minTempC, when: said(spanAt(spans, at), at, now) }] : []
}

function coldAdvice(asked: Asked): AdviceFacts[] {
  const { way, spans, prediction, now } = asked
  const { chilledAt } = prediction
  const { minTempC } = way.material.material
  if (chilledAt === null || minTempC === null) return coldStrength(asked)
  const when = said(spanAt(spans, chilledAt), chilledAt, now)
  return [{ code: chilledAt > now ? 'below-minimum-ahead' : 'chilled', minTempC, when }]
}

/** Only while the film can still take harm: from now (or the application, if that is to come) until it can be handled. */
function wetAdvice({ way, coat, spans, prediction, now, hazeGapC }: Asked): AdviceFacts[] {
  const from = Math.max(now, coat.appliedAt)
  const handle = prediction.milestones[way.material.handle]!
  const until = handle.likelyAt ?? Infinity
  if (from >= until) return []
  const span = spanAt(spans, from)
  const { clock } = span
  const { material } = way.material
  const facts: AdviceFacts[] = []
  const thinAt = inSpans(spans, from, until, 0, (s, start) => firstThinDewMargin(s.clock, start))
  if (thinAt < until) facts.push({ code: 'dew-margin', when: thinAt <= from ? null : said(spanAt(spans, thinAt), thinAt, now) })
  const gapC = trackTemp(clock.track, from) - trackDewPoint(clock.track, from)
  const limitC = hazeGapC ?? usualHazeGapC
  if (material.blushes && gapC < limitC) facts.push({ code: 'blush', gapC, limitC, seenHere: hazeGapC !== undefined })
  const ratio = ratioOfVapour(tabledSaturation(clock.tools.air, trackDewPoint(clock.track, from)))
  const floor = material.dryAirFloor ?? null
  if (floor !== null && ratio < floor) facts.push({ code: 'dry-air', floor })
  const tackFree = prediction.milestones.find(m => m.name === 'tack-free')?.likelyAt ?? null
  const blown = (coat.airSpeed ?? 0.1) > 0.3 || (coat.notes ?? []).some(n => n.kind === 'moving' && (n.toAt === null || n.toAt > from))
  if (blown && (tackFree === null || from < tackFree)) facts.push({ code: 'fan-early', when: tackFree === null ? null : said(span, tackFree, now) })
  return facts
}

function standingAdvice({ way, coat, spans, prediction, now }: Asked): AdviceFacts[] {
  const facts: AdviceFacts[] = []
  const from = Math.max(now, coat.appliedAt)
  if (lastBefore(spanAt(spans, from).clock.track.times, from) < 0) facts.push({ code: 'air-assumed' })
  const reasons = prediction.milestones.map(m => m.reason)
  if (reasons.includes('too-damp')) facts.push(dampAdvice(way, spanAt(spans, from), from))
  const coveredTill = coveredEarly(way, coat)
  if (coveredTill !== null && now < coveredTill) facts.push({ code: 'covered-early', when: said(spanAt(spans, from), coveredTill, now) })
  if (reasons.includes('outside-sheet')) facts.push({ code: 'outside-sheet' })
  const slowness = Math.max(...way.slowness)
  if (slowness > measuredSlowness) facts.push({ code: 'outside-measured', slowness })
  if ((coat.notes ?? []).some(n => n.kind === 'sun' || n.kind === 'warm air')) facts.push({ code: 'forced-drying' })
  return facts
}

/** Warmest a room is told to be made; beyond it only taking water out helps. */
const warmestC = 28

/** What the room would need: with its water as it is, the temperature at which it is just under the ceiling. */
function dampAdvice(way: Climb, span: AirSpan, at: number): AdviceFacts {
  const ceiling = Math.min(way.material.material.maxRh ?? dampCeiling, dampCeiling)
  const { track, tools } = span.clock
  const held = tabledSaturation(tools.air, trackDewPoint(track, at))
  const warmC = Math.ceil(tabledDewPoint(tools.air, held / (ceiling - 0.01)))
  return { code: 'too-damp', ceiling, warmC: warmC > trackTemp(track, at) && warmC <= warmestC ? warmC : null }
}

/** Until when an oxidising film that is covered now had better lie open: two days (C22). Null when it is not covered, or takes no air. */
function coveredEarly(way: Climb, coat: CoatCase): number | null {
  const till = coat.appliedAt + openForMs
  const covered = (coat.notes ?? []).some(n => n.kind === 'covered' && n.fromAt < till && n.toAt === null)
  return covered && way.material.rungs.some(r => r.driver === 'oxidation') ? till : null
}

/** What the air has to say about a coat, worst first: cold and dew before cautions, what stays true last. */
export function adviseCoat(asked: Asked): Advice[] {
  return [...coldAdvice(asked), ...wetAdvice(asked), ...standingAdvice(asked)].map(facts => ({ code: facts.code, text: adviceText(facts), facts }))
}
