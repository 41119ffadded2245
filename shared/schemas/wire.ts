/** Fields that hold an instant: their names end in "At", or are "at". */
type InstantName<Key> = Key extends 'at' | `${string}At` ? true : false
type WireField<Key, Value> = InstantName<Key> extends true ? (Value extends number ? string : Value) : Wire<Value>

/** A value as it crosses the wire: its instants (ms UTC) are ISO 8601 strings. */
export type Wire<T> = T extends readonly (infer Each)[] ? Wire<Each>[] : T extends object ? { [Key in keyof T]: WireField<Key, T[Key]> } : T

const isInstant = (name: string) => name === 'at' || name.endsWith('At')

function convert(value: unknown, name: string, instant: (value: unknown) => unknown): unknown {
  if (isInstant(name)) return instant(value)
  if (Array.isArray(value)) return value.map(each => convert(each, '', instant))
  if (typeof value !== 'object' || value === null) return value
  return Object.fromEntries(Object.entries(value).map(([key, each]) => [key, convert(each, key, instant)]))
}

/** Makes a value fit for the wire. Instants are found by their names, so a name in "At" is a promise. */
export function toWire<T>(value: T): Wire<T> {
  return convert(value, '', each => (typeof each === 'number' ? new Date(each).toISOString() : each)) as Wire<T>
}

/** Reads a value off the wire: the inverse of `toWire`. */
export function fromWire<T>(value: Wire<T>): T {
  return convert(value, '', each => (typeof each === 'string' ? Date.parse(each) : each)) as T
}
