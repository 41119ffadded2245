/** What must be written so that the rows at hand become the rows wanted. */
export interface Difference<Row, Wanted> { added: Wanted[], changed: { row: Row, wanted: Wanted }[], removed: Row[] }

/**
 * Compares rows with what they should be, by a key that survives a refold, so that a row keeps its number and
 * whatever points at it.
 * @param same whether a row already says what is wanted
 */
export function difference<Row, Wanted>(rows: readonly Row[], wanted: readonly Wanted[], keyOfRow: (row: Row) => string, keyOfWanted: (wanted: Wanted) => string, same: (row: Row, wanted: Wanted) => boolean): Difference<Row, Wanted> {
  const byKey = new Map(rows.map(row => [keyOfRow(row), row]))
  const result: Difference<Row, Wanted> = { added: [], changed: [], removed: [] }
  for (const each of wanted) {
    const row = byKey.get(keyOfWanted(each))
    byKey.delete(keyOfWanted(each))
    if (!row) result.added.push(each)
    else if (!same(row, each)) result.changed.push({ row, wanted: each })
  }
  result.removed.push(...byKey.values())
  return result
}

/** Whether every field of `wanted` already stands so in `row`. */
export function holds(row: object, wanted: object): boolean {
  const standing = row as Readonly<Record<string, unknown>>
  return Object.entries(wanted).every(([field, value]) => standing[field] === value)
}
