import type { Advice, CoatCase, CoatPrediction } from '#shared/drying/types'
import type { AirSpan, Climb } from '#shared/drying/ladder'
import { dampCeiling, inSpans } from '#shared/drying/refusals'
import { firstThinDewMargin } from '#shared/drying/spells'
import { lastBefore, trackDewPoint, trackTemp } from '#shared/air/room'
import { ratioOfVapour, tabledSaturation } from '#shared/air/tables'
import { localDay, localTimeOfDay } from '#shared/air/zone'
import type { AdviceFacts } from '#shared/words/advice'
import { adviceText, whenText } from '#shared/words/advice'

/** Gap to the dew point under which alcohol and lacquer films haze (20 F, a finisher's rule). */
const blushGapC = 11.1
/** Coat and ground together slower than this are outside what anybody has measured. */
const measuredSlowness = 3

interface Asked { way: Climb, coat: CoatCase, spans: readonly AirSpan[], prediction: CoatPrediction, now: number }

function spanAt(spans: readonly AirSpan[], at: number): AirSpan {
  return spans.findLast(s => s.fromAt <= at) ?? spans[0]!
}

function said(span: AirSpan, at: number, now: number): string {
  const { zone } = span.clock.track
  return whenText(localDay(zone, at), Math.floor(localTimeOfDay(zone, at) / 60_000), localDay(zone, now))
}

function coldAdvice({ way, spans, prediction, now }: Asked): AdviceFacts[] {
  const { chilledAt } = prediction
  const { minTempC } = way.material.material
  if (chilledAt === null || minTempC === null) return []
  const when = said(spanAt(spans, chilledAt), chilledAt, now)
  return [{ code: chilledAt > now ? 'below-minimum-ahead' : 'chilled', minTempC, when }]
}

/** Only while the film can still take harm: from now (or the application, if that is to come) until it can be handled. */
function wetAdvice({ way, coat, spans, prediction, now }: Asked): AdviceFacts[] {
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
  if (material.blushes && gapC < blushGapC) facts.push({ code: 'blush', gapC })
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
  if (reasons.includes('too-damp')) facts.push({ code: 'too-damp', ceiling: Math.min(way.material.material.maxRh ?? dampCeiling, dampCeiling) })
  if (reasons.includes('outside-sheet')) facts.push({ code: 'outside-sheet' })
  const slowness = Math.max(...way.slowness)
  if (slowness > measuredSlowness) facts.push({ code: 'outside-measured', slowness })
  if ((coat.notes ?? []).some(n => n.kind === 'sun' || n.kind === 'warm air')) facts.push({ code: 'forced-drying' })
  return facts
}

/** What the air has to say about a coat, worst first: cold and dew before cautions, what stays true last. */
export function adviseCoat(asked: Asked): Advice[] {
  return [...coldAdvice(asked), ...wetAdvice(asked), ...standingAdvice(asked)].map(facts => ({ code: facts.code, text: adviceText(facts) }))
}
