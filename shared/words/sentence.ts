import type { Sentence } from '#shared/sentence/read'
import { humidityText, temperatureText } from '#shared/units'
import type { Units } from '#shared/units'
import { airWords } from '#shared/words/air-page'
import { groupNames } from '#shared/words/group'
import { actText } from '#shared/words/steps'

/** One sentence, typed or dictated, and the card that asks whether it was meant so. */
export const sentenceWords = {
  label: 'Say it in one sentence',
  hint: 'Such as: gesso on ledgers 1 to 4, twenty minutes ago. Or: ledger 2 is still tacky. Or: shed 14 degrees, 70 percent.',
  read: 'Read it',
  nothing: 'Nothing of this was understood. Name what you put on and the pieces, a touch test, a move, or a room and its air.',
  empty: 'Type or dictate a sentence first.',
  card: 'Is this meant?',
  unknown: (words: readonly string[]) => `Not understood: ${words.map(word => `“${word}”`).join(', ')}.`,
  hour: 'A day is named and no hour that lies behind: give the time below.',
  which: { material: 'Which material', place: 'Which place', room: 'Which room' },
  note: 'Yes, note it',
  drop: 'No, leave it',
  wants: { material: 'Which material was not understood. Choose it below.', pieces: 'Which pieces was not understood. Say them again, or choose them below.', piecesOnly: 'Which pieces was not understood. Say the sentence again with their names.', place: 'Where to was not understood. Say the sentence again with the name of the place.', room: 'Which room was not understood. Choose it.', air: 'Say the humidity in per cent, or that it is dry, normal, damp or wet.' },
  noted: (room: string) => `Noted in ${room}.`,
} as const

/** What a sentence was understood to say, in a few words: "Coat on: White acrylic gesso, Ledgers 1–4". */
export function understoodText(sentence: Sentence, names: readonly string[], units: Units): string {
  const of = names.length > 0 ? groupNames(names) : null
  const list = (parts: readonly (string | null)[]) => parts.filter(Boolean).join(', ')
  switch (sentence.kind) {
    case 'put on': return list([actText('coat on', { material: sentence.material?.name ?? null }), of])
    case 'touch test': return list([actText('touch test', { milestone: sentence.milestone, reached: sentence.reached }), of])
    case 'moved': return list([actText('moved', {}), of, sentence.place && `to ${sentence.place.name}`])
    case 'reading': return list([sentence.room?.name ?? null, sentence.tempC === null ? null : temperatureText(sentence.tempC, units), sentence.rh === null ? null : humidityText(sentence.rh), sentence.words && airWords.words[sentence.words]])
  }
}

/** What has to be said still before a sentence can be noted, or null. `form`: the page below can be told it instead. */
export function wantedText(sentence: Sentence, pieces: number, form: boolean): string | null {
  const { wants } = sentenceWords
  if (sentence.kind === 'reading') return sentence.room === null ? wants.room : sentence.rh === null && sentence.words === null ? wants.air : null
  if (sentence.kind === 'put on' && sentence.material === null) return wants.material
  if (pieces === 0) return sentence.kind === 'put on' && form ? wants.pieces : wants.piecesOnly
  return sentence.kind === 'moved' && sentence.place === null ? wants.place : null
}
