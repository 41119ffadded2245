/** A problem or plan that does not hold together. The message names the field and what was expected. */
export class PlanError extends Error {
  override name = 'PlanError'
}

const seen = (value: unknown) => value === undefined ? 'nothing' : JSON.stringify(value)

export function refuse(field: string, expected: string, got: unknown): never {
  throw new PlanError(`${field}: expected ${expected}, got ${seen(got)}`)
}

/** @throws PlanError unless `value` is a finite number of at least `least`. */
export function number(value: unknown, field: string, least = -Infinity): number {
  if (typeof value !== 'number' || !Number.isFinite(value) || value < least) refuse(field, least === -Infinity ? 'a number' : `a number of at least ${least}`, value)
  return value
}

/** Beyond this, sums of minutes leave 32 bits. */
const most = 500_000_000

/** @throws PlanError unless `value` is a whole number of at least `least`. */
export function wholeNumber(value: unknown, field: string, least = -most): number {
  if (typeof value !== 'number' || !Number.isInteger(value) || value < least || value > most) {
    refuse(field, least === -most ? 'a whole number' : `a whole number of at least ${least}`, value)
  }
  return value
}

/** @throws PlanError unless `value` is a list. */
export function list<T>(value: unknown, field: string): readonly T[] {
  if (!Array.isArray(value)) refuse(field, 'a list', value)
  return value
}

/** @throws PlanError when an id is empty, not a text, or there twice. */
export function unique(ids: readonly string[], field: string): void {
  const found = new Set<string>()
  for (const id of ids) {
    if (typeof id !== 'string' || id === '') refuse(field, 'ids that are not empty', id)
    if (found.has(id)) refuse(field, 'every id once', id)
    found.add(id)
  }
}
