import type { AxisTick, PieceStrip, StripMilestone, StripWindow } from '#shared/strip'
import { type Clock, clockTime, roughTime, studioZone } from '#shared/time'

/** How dry a swatch is, in words; `dry` 0..1, null when nobody knows. */
export function swatchSentence(name: string, dry: number | null): string {
  if (dry === null) return `${name}: nobody knows how dry.`
  if (dry >= 1) return `${name}: likely dry.`
  return dry <= 0 ? `${name}: wet.` : `${name}: about ${Math.round(dry * 10) * 10} % of the way to dry.`
}

function milestoneWords({ label, likelyAt, giveTillAt }: StripMilestone, clock: Clock): string {
  if (giveTillAt === null) return `${label} likely ${roughTime(likelyAt, clock, 'up')}`
  if (giveTillAt === likelyAt) return `${label} ${clockTime(likelyAt, clock)}`
  const doubt = giveTillAt - likelyAt
  return `${label} likely ${roughTime(likelyAt, clock, 'up', doubt)}, give it till ${roughTime(giveTillAt, clock, 'up', doubt)}`
}

function windowWords({ opensAt, shutsAt }: StripWindow, clock: Clock): string {
  const ends = [
    opensAt === null ? '' : `opens ${roughTime(opensAt, clock, 'up')}`,
    shutsAt === null ? '' : `shuts ${roughTime(shutsAt, clock, 'down')}`,
  ].filter(Boolean)
  return ends.length === 0 ? 'the recoat window has no known end' : `the recoat window ${ends.join(' and ')}`
}

/** All a strip shows, in one sentence for those who do not see it. */
export function stripSentence(name: string, strip: PieceStrip): string {
  const clock: Clock = { now: strip.nowAt, zone: studioZone(strip.zone) }
  const said = [
    ...strip.coats.map(({ onAt }) => `coat on ${clockTime(onAt, clock)}`),
    ...strip.milestones.map(milestone => milestoneWords(milestone, clock)),
    ...strip.windows.map(window => windowWords(window, clock)),
    ...strip.planned.map(({ at, label }) => `planned ${clockTime(at, clock)}: ${label}`),
  ]
  return `${name}, now ${clockTime(strip.nowAt, clock)}: ${said.length === 0 ? 'nothing on it yet' : said.join('; ')}.`
}

/** "14" for an hour of today; "Wed" for another day, "15 Dec" where a weekday alone could mean two. */
export function tickWords(tick: AxisTick, clock: Clock): string {
  if (tick.kind === 'hour') return String(tick.wall.minute / 60)
  const [weekday = '', ...rest] = clockTime(tick.at, clock).split(' ')
  return rest.length > 1 ? rest.slice(0, 2).join(' ') : weekday
}
