import type { WindowPrediction } from '#shared/drying/types'
import { rungOfDry } from '#shared/dryness'
import type { FilmState } from '#shared/schemas/piece-state'
import type { PieceStrip, StripMilestone, StripPlanned, StripWindow } from '#shared/strip'
import { milestoneNames } from '#shared/terms'
import type { Clock } from '#shared/time'
import type { ReadPiece } from '#shared/verdict/piece'
import { milestoneText, stepLabel } from '#shared/words/steps'

const hour = 3_600_000
const day = 24 * hour
/** Earlier films are drawn when they went on so shortly before the newest. */
const sameStretch = 2 * day
/** What lies further off than this is left out while something nearer is to come. */
const farAway = 7 * day

/** What hands may do waits for 98 %; what the next step may do for 90 %. */
const cautious: readonly string[] = ['dry-to-handle', 'out-of-clamps', 'full-strength', 'cured']

function milestonesOf(film: FilmState): StripMilestone[] {
  return film.milestones.flatMap(({ name, likelyAt, p90At, p98At, reachedAt }) => {
    const label = milestoneNames.find(each => each === name)
    if (label === undefined) return []
    if (reachedAt !== null) return [{ label: milestoneText(label), likelyAt: reachedAt, giveTillAt: reachedAt }]
    return likelyAt === null ? [] : [{ label: milestoneText(label), likelyAt, giveTillAt: cautious.includes(name) ? p98At : p90At }]
  })
}

/** The window that can still be kept, or else the last that shut: never two shut ends on one strip. */
function windowOf(windows: readonly WindowPrediction[], now: number): StripWindow[] {
  const ahead = windows.find(({ shutsAt }) => shutsAt === null || shutsAt > now)
  const one = ahead ?? windows.at(-1)
  return one && (one.opensAt !== null || one.shutsAt !== null) ? [{ opensAt: one.opensAt, shutsAt: one.shutsAt }] : []
}

function plannedOf(piece: ReadPiece, now: number): StripPlanned[] {
  return piece.turns.flatMap(({ turn }) => turn.kind === 'work' && turn.status === 'waiting' && turn.plan && turn.plan.startsAt >= now
    ? [{ at: turn.plan.startsAt, label: stepLabel(turn.step.kind, turn.step.name) }]
    : [])
}

const ends = (milestone: StripMilestone) => milestone.giveTillAt ?? milestone.likelyAt

/** Where the strip stops being of use: the last thing worth waiting for within a week, or the next one beyond. */
function usefulEnd(instants: readonly number[], now: number): number {
  const ahead = instants.filter(at => at > now).sort((a, b) => a - b)
  const near = ahead.filter(at => at <= now + farAway)
  return Math.max(near.at(-1) ?? ahead[0] ?? now, now + hour)
}

/**
 * The drying strip of a piece: its newest films from their application to a useful end, with milestones, the next recoat
 * window and what is planned. Null when nothing on it can change any more and nothing is planned.
 */
export function pieceStrip(piece: ReadPiece, clock: Clock): PieceStrip | null {
  const { now, zone } = clock
  const films = piece.groups.flatMap(({ group }) => group.films).filter((film, index, all) => all.findIndex(each => each.coatId === film.coatId) === index).sort((a, b) => a.endedAt - b.endedAt)
  const planned = plannedOf(piece, now)
  const newest = films.at(-1)
  if (!newest && planned.length === 0) return null
  const drawn = newest ? films.filter(film => film.endedAt >= newest.endedAt - sameStretch) : []
  const milestones = newest ? milestonesOf(newest) : []
  const windows = newest ? windowOf(newest.windows, now) : []
  const toAt = usefulEnd([...milestones.map(ends), ...planned.map(({ at }) => at), ...windows.flatMap(({ shutsAt }) => shutsAt ?? [])], now)
  const fromAt = Math.min(drawn[0]?.beganAt ?? now, now) - hour / 4
  const margin = (toAt - fromAt) * 0.06
  return {
    fromAt: Math.max(fromAt, now - 390 * day / 2), toAt: Math.min(toAt + margin, now + 390 * day / 2), nowAt: now, zone: zone.name,
    coats: drawn.map(film => ({ onAt: film.endedAt, likelyAt: rungOfDry(film)?.reachedAt ?? rungOfDry(film)?.likelyAt ?? null, giveTillAt: rungOfDry(film)?.reachedAt ?? rungOfDry(film)?.p98At ?? null })),
    milestones: milestones.filter(each => each.likelyAt <= toAt), windows, planned: planned.filter(({ at }) => at <= toAt),
  }
}
