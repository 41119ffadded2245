import type { AxisTick, PieceStrip, StripMilestone, StripWindow } from '#shared/strip'
import { type WallClock, wallClock } from '#shared/time'
import { dayWords, whenWords, type Told } from '#shared/words/when'

/** How dry a swatch is, in words; `dry` 0..1, null when nobody knows. */
export function swatchSentence(name: string, dry: number | null): string {
  if (dry === null) return `${name}: nobody knows how dry.`
  if (dry >= 1) return `${name}: likely dry.`
  return dry <= 0 ? `${name}: wet.` : `${name}: about ${Math.round(dry * 10) * 10} % of the way to dry.`
}

function milestoneWords({ label, likelyAt, giveTillAt }: StripMilestone, told: Told): string {
  const doubt = giveTillAt === null ? 0 : giveTillAt - likelyAt
  const likely = whenWords(likelyAt, { ...told, doubt })
  if (giveTillAt === null) return `${label} likely ${likely}`
  if (doubt === 0) return `${label} ${likely}`
  return `${label} likely ${likely}, give it till ${whenWords(giveTillAt, { ...told, doubt, round: 'up' })}`
}

function windowWords({ opensAt, shutsAt }: StripWindow, told: Told): string {
  const ends = [
    opensAt === null ? '' : `opens ${whenWords(opensAt, { ...told, round: 'up' })}`,
    shutsAt === null ? '' : `shuts ${whenWords(shutsAt, { ...told, round: 'down' })}`,
  ].filter(Boolean)
  return ends.length === 0 ? 'the recoat window has no known end' : `the recoat window ${ends.join(' and ')}`
}

/** All a strip shows, in one sentence for those who do not see it. */
export function stripSentence(name: string, strip: PieceStrip): string {
  const told: Told = { nowAt: strip.nowAt, clock: wallClock(strip.zone) }
  const said = [
    ...strip.coats.map(({ onAt }) => `coat on ${whenWords(onAt, told)}`),
    ...strip.milestones.map(milestone => milestoneWords(milestone, told)),
    ...strip.windows.map(window => windowWords(window, told)),
    ...strip.planned.map(({ at, label }) => `planned ${whenWords(at, told)}: ${label}`),
  ]
  return `${name}, now ${whenWords(strip.nowAt, told)}: ${said.length === 0 ? 'nothing on it yet' : said.join('; ')}.`
}

/** "14" for an hour of today, "Wed" or "15 Dec" for another day. */
export function tickWords(tick: AxisTick, nowAt: number, clock: WallClock): string {
  return tick.kind === 'hour' ? String(tick.wall.minute / 60) : dayWords(tick.at, nowAt, clock)
}
