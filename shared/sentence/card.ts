import type { Named } from '#shared/sentence/names'
import type { Sentence } from '#shared/sentence/read'

/** What a sentence of each kind names beside pieces. */
export const thingOf = { 'put on': 'material', 'moved': 'place', 'reading': 'room', 'touch test': null } as const

const foundIn = (sentence: Sentence) => {
  if (sentence.kind === 'touch test') return null
  return sentence.kind === 'put on' ? sentence.material : sentence.kind === 'moved' ? sentence.place : sentence.room
}

/** What the name in a sentence may mean, the likeliest first; all rooms for a reading that names none. */
export function choicesOf(sentence: Sentence, rooms: readonly Named[]): readonly Named[] {
  const found = foundIn(sentence)
  if (found) return [{ id: found.id, name: found.name }, ...found.others]
  return sentence.kind === 'reading' ? rooms : []
}

/** The sentence with one of its choices in place of what was read. */
export function withChoice(sentence: Sentence, choice: Named | null): Sentence {
  if (!choice || sentence.kind === 'touch test') return sentence
  const found = { id: choice.id, name: choice.name, others: [] }
  if (sentence.kind === 'put on') return { ...sentence, material: found }
  return sentence.kind === 'moved' ? { ...sentence, place: found } : { ...sentence, room: found }
}
