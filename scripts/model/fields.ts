/** A field of a case that cannot be used: one line, naming the field and what was expected. */
export class BadField extends Error {}

function shown(value: unknown): string {
  return value === undefined ? 'nothing' : JSON.stringify(value)
}

function refuse(field: string, expected: string, value: unknown): never {
  throw new BadField(`${field}: expected ${expected}, got ${shown(value)}`)
}

export type Fields = Record<string, unknown>

export function objectAt(field: string, value: unknown): Fields {
  if (typeof value !== 'object' || value === null || Array.isArray(value)) refuse(field, 'an object', value)
  return value as Fields
}

export function listAt(field: string, value: unknown): unknown[] {
  if (!Array.isArray(value)) refuse(field, 'a list', value)
  return value as unknown[]
}

export function numberAt(field: string, value: unknown, low: number, high: number): number {
  if (typeof value === 'number' && value >= low && value <= high) return value
  return refuse(field, `a number from ${low} to ${high}`, value)
}

export function textAt(field: string, value: unknown): string {
  if (typeof value === 'string' && value.trim() !== '') return value
  return refuse(field, 'a word', value)
}

export function yesNoAt(field: string, value: unknown): boolean {
  if (typeof value === 'boolean') return value
  return refuse(field, 'true or false', value)
}

export function oneOfAt<T extends string>(field: string, value: unknown, words: readonly T[]): T {
  const word = words.find(w => w === value)
  return word ?? refuse(field, `one of ${words.join(', ')}`, value)
}

const instantForm = /^(\d{4})-(\d{2})-(\d{2})T(\d{2}):(\d{2})(?::(\d{2})(?:\.\d{1,9})?)?(?:Z|[+-]\d{2}:\d{2})$/

/** ms UTC of an ISO 8601 instant with its offset; a 30 February is refused, not carried over into March. */
export function instantAt(field: string, value: unknown): number {
  const expected = 'an instant such as 2026-04-06T21:00:00Z'
  const parts = typeof value === 'string' ? instantForm.exec(value) : null
  if (!parts) return refuse(field, expected, value)
  const at = Date.parse(value as string)
  const day = new Date(Date.UTC(Number(parts[1]), Number(parts[2]) - 1, Number(parts[3])))
  if (Number.isNaN(at) || day.getUTCMonth() + 1 !== Number(parts[2]) || day.getUTCDate() !== Number(parts[3])) return refuse(field, expected, value)
  return at
}

/** Reads a field that may be left out: `null` and absent give the default. */
export function optional<T, D>(value: unknown, otherwise: D, read: (value: unknown) => T): T | D {
  return value === undefined || value === null ? otherwise : read(value)
}
