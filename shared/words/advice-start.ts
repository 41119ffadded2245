import type { Units } from '#shared/units'
import { temperatureText } from '#shared/units'

/** Advice about what is about to go on, be joined or be packed, that does not come from the film's own clock. `when` is a clock time ready to print. */
export type StartAdvice =
  /** A rule of one finish over another; `text` is the rule's own sentence. */
  | { code: 'over-too-early', text: string, laid: string, when: string }
  | { code: 'over-better-later', text: string, laid: string, when: string }
  | { code: 'never-over', text: string }
  /** Moisture of board or wood, per cent of the dry weight: as it is, and at rest in the room where it is glued. */
  | { code: 'acclimatise', moisture: number, rest: number, when: string }
  | { code: 'still-air' }
  | { code: 'pot-life', minutes: number, sheetMinutes: number, tempC: number }
  /** `minutes`: the least that a mix lasts; `each`: pieces that one is enough for. */
  | { code: 'several-mixes', minutes: number, pieces: number, each: number, mixes: number }
  /** `minutes`: the least that glue stays open; `joined`: how long a joint may be moved after that, 0 where nobody knows; `takes`: hands-on minutes of one piece; `room`: where it would stay open longer. */
  | { code: 'open-time', minutes: number, joined: number, takes: number, room: 'cooler' | 'warmer' | null }
  | { code: 'pack-early', when: string }

/** How long glue stays open, in whole minutes and never too many. */
export const openSpan = (minutes: number) => minutes < 1 ? 'less than a minute' : `${Math.floor(minutes)} min`

/** The sentence for one of them. */
export function startAdviceText(facts: StartAdvice, units: Units = 'metric'): string {
  switch (facts.code) {
    case 'over-too-early': return `${facts.text} The film beneath went on ${facts.laid}: not before ${facts.when}.`
    case 'over-better-later': return `${facts.text} The film beneath went on ${facts.laid}: better from ${facts.when}.`
    case 'never-over': return `${facts.text} Strip the film beneath, or leave this out.`
    case 'acclimatise': return `Wood and board here come to rest at ${facts.rest.toFixed(1)} % moisture; these are near ${facts.moisture.toFixed(1)} %, from where they lay. Let them lie here till ${facts.when}, or the joint is strained as they settle.`
    case 'still-air': return 'Somebody said that the air moves here: leaf wants it still.'
    case 'pot-life': return `At ${temperatureText(facts.tempC, units)} what is mixed lasts about ${Math.round(facts.minutes)} min; the sheet says ${Math.round(facts.sheetMinutes)}. A deep pot goes off sooner: mix less.`
    case 'several-mixes': return `What is mixed may go off after ${Math.floor(facts.minutes)} min: enough for ${facts.each} of these ${facts.pieces}. Mix ${facts.mixes} times.`
    case 'open-time': return `Once spread, this glue may skin over or set ${facts.minutes < 1 ? 'within a minute' : `after ${openSpan(facts.minutes)}`}${facts.joined < 1 ? '' : `, and joined it can be moved for ${openSpan(facts.joined)} more`}; this glue-up takes ${facts.takes}. Spread only as much as is joined within that, have another pair of hands,${facts.room === null ? '' : ` work in a ${facts.room} room,`} or use a glue that stays open longer.`
    case 'pack-early': return `Wrapped before ${facts.when} it may print: two days at least, longer in damp air, and never finish to finish.`
  }
}
