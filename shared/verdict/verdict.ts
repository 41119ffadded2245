import { compareClaims, rank, speakingClaim } from '#shared/verdict/claims'
import type { Claim } from '#shared/verdict/claims'
import { turningPoints } from '#shared/verdict/films'
import { limitsOf, mergeLimits } from '#shared/verdict/limits'
import type { PartFacts, Verdict } from '#shared/verdict/types'

/** A page that has not heard from the studio for so long lifts nothing by its own clock. ms. */
export const cutOffAfterMs = 5 * 60_000

const gripOf = (claim: Claim) => claim.reason.code === 'grip wet' ? claim.reason.grip : null

/** Whether a page that last heard from the studio at `heardAt` (ms UTC; null: it is the studio) is cut off at `now`. */
export function isCutOff(now: number, heardAt: number | null): boolean {
  return heardAt !== null && now - heardAt >= cutOffAfterMs
}

/** The latest instant at which a page may let time lift anything: `now`, or five minutes after the last word. ms UTC. */
export function liftingTime(now: number, heardAt: number | null): number {
  return heardAt !== null && isCutOff(now, heardAt) ? heardAt + cutOffAfterMs : now
}

function firstBetter(parts: readonly PartFacts[], current: Claim, now: number): Pick<Verdict, 'betterAt' | 'betterKind' | 'betterGrip'> {
  for (const at of turningPoints(parts.flatMap(part => part.films), now)) {
    const claim = speakingClaim(parts, at, at)
    if (rank(claim.kind) > rank(current.kind)) return { betterAt: at, betterKind: claim.kind, betterGrip: gripOf(claim) }
  }
  return { betterAt: null, betterKind: null, betterGrip: null }
}

function cutOffVerdict(parts: readonly PartFacts[], now: number, heardAt: number): Verdict {
  const at = heardAt + cutOffAfterMs
  const claim = speakingClaim(parts, at, now)
  const nothing = { grip: null, betterAt: null, betterKind: null, betterGrip: null }
  if (claim.kind === 'hands off' || claim.kind === 'ask first') {
    return { kind: claim.kind, line: claim.line, reason: claim.reason, limits: [], ...nothing }
  }
  return { kind: 'ask first', line: 0, reason: { code: 'cut off', since: heardAt }, limits: limitsOf(parts.flatMap(part => part.films), at), ...nothing }
}

/**
 * What hands may do with parts that move together: the worst line of the truth table that applies.
 * @param parts every part that moves with the others; none at all reads as a piece without a place
 * @param now ms UTC
 * @param heardAt when this page last heard from the studio, ms UTC; null where the studio itself asks
 * @throws RangeError when `now` is not a finite number
 */
export function pieceVerdict(parts: readonly PartFacts[], now: number, heardAt: number | null): Verdict {
  if (!Number.isFinite(now)) throw new RangeError('now must be an instant in milliseconds')
  if (parts.length === 0) {
    return { kind: 'ask first', line: 10, grip: null, reason: { code: 'not there', where: null, seenAt: null }, betterAt: null, betterKind: null, betterGrip: null, limits: [] }
  }
  if (heardAt !== null && isCutOff(now, heardAt)) return cutOffVerdict(parts, now, heardAt)
  const claim = speakingClaim(parts, now, now)
  const held = claim.line === 12 || claim.line === 13
  return {
    kind: claim.kind,
    line: claim.line,
    grip: gripOf(claim),
    reason: claim.reason,
    ...firstBetter(parts, claim, now),
    limits: held ? limitsOf(parts.flatMap(part => part.films), now) : [],
  }
}

/** Null is later than any instant. */
const lasting = (at: number | null) => at ?? Infinity

/** Which of the verdicts of one kind speaks for the group: the lower line, then the one that lasts longest. */
function speaksBefore(a: Verdict, b: Verdict): number {
  return compareClaims({ ...a, weight: lasting(a.betterAt) }, { ...b, weight: lasting(b.betterAt) })
}

function groupBetter(verdicts: readonly Verdict[], worst: readonly Verdict[]): Pick<Verdict, 'betterAt' | 'betterKind' | 'betterGrip'> {
  const last = worst.reduce((a, b) => lasting(b.betterAt) > lasting(a.betterAt) ? b : a)
  if (last.betterAt === null) return { betterAt: null, betterKind: null, betterGrip: null }
  const after = verdicts.flatMap(verdict => worst.includes(verdict)
    ? verdict.betterKind ? [{ kind: verdict.betterKind, grip: verdict.betterGrip }] : []
    : [{ kind: verdict.kind, grip: verdict.grip }])
  const then = after.reduce((a, b) => rank(b.kind) < rank(a.kind) ? b : a)
  const grips = new Set(after.filter(one => one.kind === then.kind).map(one => one.grip))
  return { betterAt: last.betterAt, betterKind: then.kind, betterGrip: grips.size === 1 ? then.grip : null }
}

/**
 * One line for a group of pieces: the worst verdict over them and, of the pieces it holds for, the latest next moment.
 * What it gets better to is at most what the group is then known to be. Null for no pieces.
 */
export function groupVerdict(verdicts: readonly Verdict[]): Verdict | null {
  const first = verdicts[0]
  if (first === undefined) return null
  const spoken = verdicts.reduce((a, b) => speaksBefore(b, a) < 0 ? b : a, first)
  const worst = verdicts.filter(verdict => verdict.kind === spoken.kind)
  const grips = new Set(worst.map(verdict => verdict.grip))
  const limited = spoken.kind === 'hold by' || spoken.kind === 'may be handled' || spoken.line === 0
  return {
    kind: spoken.kind,
    line: spoken.line,
    grip: grips.size === 1 ? spoken.grip : null,
    reason: spoken.reason,
    ...groupBetter(verdicts, worst),
    limits: limited ? mergeLimits(verdicts.flatMap(verdict => verdict.limits)) : [],
  }
}
