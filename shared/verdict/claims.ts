import { isDamp, isGrip, isUnknown, isUnpromised, isWet, timeOf } from '#shared/verdict/films'
import { verdictKinds } from '#shared/verdict/types'
import type { Film, PartFacts, VerdictKind, VerdictReason } from '#shared/verdict/types'

/** One line of the truth table that applies. `weight` orders what one line says of several films: the greater speaks. */
export interface Claim { kind: VerdictKind, line: number, reason: VerdictReason, weight: number }

/** 0 is worst. */
export const rank = (kind: VerdictKind) => verdictKinds.indexOf(kind)

const lasting = (time: number | null) => time ?? Infinity

function partClaims(part: PartFacts, dueNow: number): Claim[] {
  const claims: Claim[] = []
  if (part.keepOut) claims.push({ kind: 'hands off', line: 1, reason: { code: 'keep out', room: part.keepOut.room }, weight: 0 })
  if (part.doing) claims.push({ kind: 'hands off', line: 2, reason: { code: 'in hand', by: part.doing.by, what: part.doing.what }, weight: part.doing.since })
  if (part.due && part.due.at <= dueNow) claims.push({ kind: 'ask first', line: 9, reason: { code: 'coat due', at: part.due.at, what: part.due.what }, weight: -part.due.at })
  if (part.missing) claims.push({ kind: 'ask first', line: 10, reason: { code: 'not there', where: part.missing.where, seenAt: part.missing.seenAt }, weight: 1 })
  else if (!part.place) claims.push({ kind: 'ask first', line: 10, reason: { code: 'not there', where: null, seenAt: null }, weight: 0 })
  if (part.intake) claims.push({ kind: 'ask first', line: 11, reason: { code: 'intake', question: part.intake }, weight: 0 })
  return claims
}

function doubtClaim(film: Film, at: number): Claim[] {
  if (!film.doubt) return []
  const { cause, fromAt } = film.doubt
  if (isDamp(film, at)) return [{ kind: 'hands off', line: 5, reason: { code: 'doubt wet', cause, fromAt }, weight: fromAt }]
  return [{ kind: 'ask first', line: 6, reason: { code: 'doubt', cause, fromAt }, weight: fromAt }]
}

function wetClaim(film: Film, at: number, grip: string | null): Claim[] {
  const until = film.handle && timeOf(film.handle)
  const reason = film.handle?.reason ?? null
  if (isWet(film, at)) {
    if (grip !== null) return [{ kind: 'hold by', line: 12, reason: { code: 'grip wet', grip }, weight: lasting(until) }]
    return [{ kind: 'hands off', line: 7, reason: { code: 'wet', material: film.material, until, reason }, weight: lasting(until) }]
  }
  // A 98 % time alone may lie past the clock's horizon, likely and 90 % within it: then the film has no reason of its own.
  if (isUnpromised(film)) return [{ kind: 'ask first', line: 8, reason: { code: 'no promise', reason: reason ?? 'never' }, weight: 0 }]
  return []
}

function filmClaims(film: Film, at: number, grip: string | null): Claim[] {
  const claims = [...doubtClaim(film, at), ...wetClaim(film, at, grip)]
  if (film.hold) {
    // Time lifts nothing here: it is only said, and as the taking out is: at 90 %.
    const giveTillAt = film.handle && (film.handle.reachedAt ?? film.handle.p90At)
    claims.push({ kind: 'hands off', line: 3, reason: { code: 'held', hold: film.hold, giveTillAt }, weight: lasting(giveTillAt) })
  }
  if (isUnknown(film)) claims.push({ kind: 'hands off', line: 4, reason: { code: 'unknown film' }, weight: 0 })
  return claims
}

/** The grip by which parts that move together may be held at `at`, or null. */
function gripAt(parts: readonly PartFacts[], films: readonly Film[], at: number): string | null {
  return parts.find(part => part.grip && isGrip(part.grip, films, at))?.grip?.name ?? null
}

/** Order in which claims speak: the worst verdict, then the lower line, then the weightier. */
export function compareClaims(a: Claim, b: Claim): number {
  if (a.kind !== b.kind) return rank(a.kind) - rank(b.kind)
  return a.line - b.line || (a.weight === b.weight ? 0 : b.weight - a.weight)
}

/** Reads every line of the truth table at `at`, line 9 at `dueNow` (ms UTC), and returns the one that speaks. */
export function speakingClaim(parts: readonly PartFacts[], at: number, dueNow: number): Claim {
  const films = parts.flatMap(part => part.films)
  const grip = gripAt(parts, films, at)
  const claims = [
    ...parts.flatMap(part => partClaims(part, dueNow)),
    ...films.flatMap(film => filmClaims(film, at, grip)),
    { kind: 'may be handled', line: 13, reason: { code: 'dry' }, weight: 0 } satisfies Claim,
  ]
  return claims.reduce((worst, claim) => compareClaims(claim, worst) < 0 ? claim : worst)
}
