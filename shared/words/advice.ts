import { temperatureGapText, temperatureText } from '#shared/units'
import type { Units } from '#shared/units'

/** Advice the air gives about a coat: one code, one sentence. Temperatures in degrees Celsius, RH 0..1; `when` is a clock time ready to print. */
export type AdviceFacts =
  | { code: 'air-assumed' }
  | { code: 'dew-margin', when: string | null }
  | { code: 'below-minimum-ahead', minTempC: number, when: string }
  | { code: 'chilled', minTempC: number, when: string }
  | { code: 'cold-before-strength', minTempC: number, when: string }
  | { code: 'too-damp', ceiling: number, warmC: number | null }
  | { code: 'dry-air', floor: number }
  | { code: 'blush', gapC: number, limitC: number, seenHere: boolean }
  | { code: 'outside-measured', slowness: number }
  | { code: 'outside-sheet' }
  | { code: 'fan-early', when: string | null }
  | { code: 'forced-drying' }
  | { code: 'covered-early', when: string }

export type AdviceCode = AdviceFacts['code']

const percent = (share: number) => `${Math.round(share * 100)} %`

/** Why a film may haze: how near the dew point the air is, and whose limit that is under. */
function hazeReason({ gapC, limitC, seenHere }: Extract<AdviceFacts, { code: 'blush' }>, units: Units): string {
  const limit = temperatureGapText(limitC, units)
  return `The air is ${temperatureGapText(gapC, units)} above its dew point; ${seenHere ? `going by what was seen here, it may haze under ${limit}` : `under ${limit} such a film may haze`}.`
}

const warmer = (warmC: number | null, units: Units) => warmC === null ? '' : `, or warm it to ${temperatureText(warmC, units)}`

/** The sentence for one piece of advice about a film that is on. */
export function adviceText(facts: AdviceFacts, units: Units = 'metric'): string {
  const margin = temperatureGapText(3, units)
  switch (facts.code) {
    case 'air-assumed': return 'Nobody has read the air here: the times are for the usual climate.'
    case 'dew-margin': return facts.when === null
      ? `The air is less than ${margin} above its dew point: hold, water settles on the work.`
      : `Less than ${margin} above the dew point from ${facts.when}: bring it in by then.`
    case 'below-minimum-ahead': return `The room falls under ${temperatureText(facts.minTempC, units)} at ${facts.when}, while this is still wet: bring it in by then.`
    case 'chilled': return `Under ${temperatureText(facts.minTempC, units)} from ${facts.when} while it was wet: test it or strip it before going on.`
    case 'cold-before-strength': return `The room falls under ${temperatureText(facts.minTempC, units)} at ${facts.when}, before the joint has its strength: glue that cold dries weak. Keep it warm until then.`
    case 'too-damp': return `At ${percent(facts.ceiling)} humidity or more no time is promised: dry the room${warmer(facts.warmC, units)}, to get under it.`
    case 'dry-air': return `The air holds less than ${Number((facts.floor * 1000).toFixed(1))} g of water in a kilogram: this cures from moisture and hardly moves.`
    case 'blush': return `${hazeReason(facts, units)} Wait, put retarder in, or go on and watch for haze.`
    case 'outside-measured': return `This coat is ${Number(facts.slowness.toFixed(1))} times slower than the sheet’s: outside what anybody has measured.`
    case 'outside-sheet': return 'Over three times the longest on the sheet: something is wrong with this coat.'
    case 'fan-early': return facts.when === null ? 'Keep the fan off until it is tack-free.' : `Keep the fan off until it is tack-free, ${facts.when}.`
    case 'covered-early': return `It takes air to harden: do not cover it before ${facts.when}, two days after it went on.`
    case 'forced-drying': return 'Sun or warm air on it: the times are less sure, and nothing is learned from this coat.'
  }
}

/** The same before it goes on: what would come of beginning at once. Null where only a film that is on has something to mind. */
export function beforeText(facts: AdviceFacts, units: Units = 'metric'): string | null {
  const margin = temperatureGapText(3, units)
  switch (facts.code) {
    case 'air-assumed': return 'Nobody has read the air here: note it before this goes on.'
    case 'dew-margin': return facts.when === null
      ? `The air is less than ${margin} above its dew point: hold it back, water would settle on the work.`
      : `Less than ${margin} above the dew point from ${facts.when}, and this would still be wet: have it in somewhere drier by then.`
    case 'below-minimum-ahead': return `The room falls under ${temperatureText(facts.minTempC, units)} at ${facts.when}, and this would still be wet: let it dry where it stays warmer.`
    case 'chilled': return `The room is under ${temperatureText(facts.minTempC, units)}, the least for this: warm it first, or take the work where it is warmer.`
    case 'cold-before-strength': return `The room falls under ${temperatureText(facts.minTempC, units)} at ${facts.when}, before the joint would have its strength: glue that cold dries weak. Clamp it where it stays warmer.`
    case 'too-damp': return `At ${percent(facts.ceiling)} humidity or more this is not to go on: dry the room first${warmer(facts.warmC, units)}.`
    case 'dry-air': return `The air holds less than ${Number((facts.floor * 1000).toFixed(1))} g of water in a kilogram: this cures from moisture and would hardly move. Damp one face, or the room.`
    case 'blush': return `${hazeReason(facts, units)} Wait, or put retarder in and watch for haze.`
    case 'outside-measured': return `A coat of this kind here is ${Number(facts.slowness.toFixed(1))} times slower than the sheet’s: nobody has measured that.`
    case 'fan-early': case 'outside-sheet': case 'forced-drying': case 'covered-early': return null
  }
}

/** Advice that cannot wait to be looked for: the work takes harm. */
const pressing: readonly string[] = ['dew-margin', 'below-minimum-ahead', 'chilled', 'cold-before-strength', 'too-damp', 'over-too-early', 'never-over']
export const presses = (code: string) => pressing.includes(code)

// What advice that asks for warm, dry or moving air says instead in a room with a wet solvent film: a heater or a motor there feeds the vapour and can light it.
const besideSolvent = new Map<string, string>(Object.entries({
  'too-damp': 'Too damp for a time to be promised. Wait for drier air: no heater, dehumidifier or fan beside a wet solvent film.',
  'cold-before-strength': 'It turns cold before the joint has its strength: glue that cold dries weak. Take it to a warmer room: no heater beside a wet solvent film.',
} satisfies Partial<Record<AdviceCode, string>>))

/** A piece of advice as it is said beside a wet solvent film; null where it asks for nothing that would feed the vapour. */
export const besideSolventText = (code: string): string | null => besideSolvent.get(code) ?? null

/** The same before a coat or a glue line goes on. */
export const besideSolventBefore = (code: string): string | null => code === 'chilled' ? 'It is too cold for this in here: take the work where it is warmer, no heater beside a wet solvent film.' : besideSolventText(code)

/** How long a mixed quantity lasts at the room's warmth, against its sheet. Minutes. */
export function potLifeText({ room, minutes, sheetMinutes, tempC }: { room: string, minutes: number, sheetMinutes: number, tempC: number }, units: Units = 'metric'): string {
  return `${room}, ${temperatureText(tempC, units)}: what is mixed lasts about ${Math.round(minutes)} min; the sheet says ${Math.round(sheetMinutes)}. A deep pot goes off sooner.`
}

const weekdays = ['Sun', 'Mon', 'Tue', 'Wed', 'Thu', 'Fri', 'Sat']

/** A clock time, with its weekday when it is not on the day it is read. `day` counts local days since 1 January 1970. */
export function whenText(day: number, minuteOfDay: number, today: number): string {
  const clock = `${String(Math.floor(minuteOfDay / 60)).padStart(2, '0')}:${String(minuteOfDay % 60).padStart(2, '0')}`
  return day === today ? clock : `${weekdays[(((day + 4) % 7) + 7) % 7]} ${clock}`
}
