import { freeKey } from '#shared/schedules/edit'
import { partShapes } from '#shared/words/parts'
import type { FaceName } from '#shared/words/parts'

/** A line of the form: so many parts of one name with the same faces. `count` is null while it is no number. */
export interface PartRow { name: string, count: number | null, faces: FaceName[] }

/** A part as a batch is started with it. */
export interface GivenPart { name: string, faces: string[] }

export const mostParts = 24
/** The most of one name in a line. */
export const mostAlike = 20

export const partShapeNames = ['one', 'box', 'book', 'dresser', 'own'] as const
export type PartShape = typeof partShapeNames[number]

/** The lines a shape begins with: a figure to press, a name to change where it is another. */
export const rowsOf = (shape: PartShape): PartRow[] => partShapes[shape].rows.map(row => ({ ...row, faces: [...row.faces] }))

/** "Drawer" three times as "Drawer 1" to "Drawer 3"; what is there once has no number. A line of none is left out. */
export function partsOf(rows: readonly PartRow[]): GivenPart[] {
  return rows.flatMap(({ name, count, faces }) => Array.from({ length: Math.max(0, count ?? 0) }, (_, index) => ({ name: count === 1 ? name.trim() : `${name.trim()} ${index + 1}`, faces: [...faces] })))
}

/** What is wrong with the lines: by line, and of all of them. */
export type PartMistake = { row: number, why: 'name' | 'count' } | { row: number, why: 'same', as: number } | { row: null, why: 'none' | 'many' }

const heard = (name: string) => name.trim().replace(/\s+/g, ' ').toLocaleLowerCase('en')
/** The names that a line takes: its own, and those of its parts where it has several. None where it counts none. */
const namesOf = (row: PartRow) => row.count === 0 ? [] : [...new Set([heard(row.name), ...partsOf([row]).map(part => heard(part.name))])]

/** The first mistake in the lines of the form; null where there is none. */
export function partMistake(rows: readonly PartRow[]): PartMistake | null {
  const nameless = rows.findIndex(row => row.name.trim() === '')
  if (nameless >= 0) return { row: nameless, why: 'name' }
  const uncounted = rows.findIndex(({ count }) => count === null || !Number.isInteger(count) || count < 0 || count > mostAlike)
  if (uncounted >= 0) return { row: uncounted, why: 'count' }
  const names = rows.map(namesOf)
  const firstWith = (own: readonly string[]) => names.findIndex(others => others.some(name => own.includes(name)))
  const twice = names.findIndex((own, index) => own.length > 0 && firstWith(own) < index)
  if (twice >= 0) return { row: twice, why: 'same', as: firstWith(names[twice] ?? []) }
  const total = partsOf(rows).length
  return total === 0 ? { row: null, why: 'none' } : total > mostParts ? { row: null, why: 'many' } : null
}

/** Parts with the keys that acts know them and their faces by. */
export function keyedParts(parts: readonly GivenPart[]) {
  const keys: string[] = []
  return parts.map(({ name, faces }) => {
    const key = freeKey(name, keys)
    keys.push(key)
    const own: string[] = []
    return {
      key, name, grip: null,
      faces: faces.map((face) => {
        const faceKey = freeKey(face, own)
        own.push(faceKey)
        return { key: faceKey, name: face }
      }),
    }
  })
}
