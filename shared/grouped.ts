/**
 * Rows under their keys, each list in the order the rows came, the keys in the order they were first seen.
 * @param keyOf what a row belongs under; a row without one (null) is left out
 */
export function grouped<Row, Key>(rows: Iterable<Row>, keyOf: (row: Row) => Key | null): Map<Key, Row[]> {
  const groups = new Map<Key, Row[]>()
  for (const row of rows) {
    const key = keyOf(row)
    if (key === null) continue
    const list = groups.get(key)
    if (list) list.push(row)
    else groups.set(key, [row])
  }
  return groups
}
