/** Lists of different lengths laid end to end in one typed array for each field: list i is at `at[i]` up to `at[i + 1]`. */
export interface Rows<Field extends string> { at: Int32Array, of: Record<Field, Int32Array> }

/** Lays lists end to end. Numbers are whole. */
export function rowsOf<Field extends string>(lists: readonly (readonly Readonly<Record<Field, number>>[])[], fields: readonly Field[]): Rows<Field> {
  const at = new Int32Array(lists.length + 1)
  lists.forEach((list, i) => {
    at[i + 1] = at[i]! + list.length
  })
  const all = lists.flat()
  return { at, of: Object.fromEntries(fields.map(field => [field, Int32Array.from(all, each => each[field])])) as Record<Field, Int32Array> }
}
