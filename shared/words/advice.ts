/** Advice the air gives about a coat: one code, one sentence. Temperatures in degrees Celsius, RH 0..1; `when` is a clock time ready to print. */
export type AdviceFacts =
  | { code: 'air-assumed' }
  | { code: 'dew-margin', when: string | null }
  | { code: 'below-minimum-ahead', minTempC: number, when: string }
  | { code: 'chilled', minTempC: number, when: string }
  | { code: 'cold-before-strength', minTempC: number, when: string }
  | { code: 'too-damp', ceiling: number, warmC: number | null }
  | { code: 'dry-air', floor: number }
  | { code: 'blush', gapC: number }
  | { code: 'outside-measured', slowness: number }
  | { code: 'outside-sheet' }
  | { code: 'fan-early', when: string | null }
  | { code: 'forced-drying' }
  | { code: 'covered-early', when: string }

export type AdviceCode = AdviceFacts['code']

/** Degrees as they are said: whole, or with one decimal. */
function degrees(value: number): string {
  return `${Number(value.toFixed(1))} °C`.replace('-', '−')
}

const percent = (share: number) => `${Math.round(share * 100)} %`

/** The sentence for one piece of advice. */
export function adviceText(facts: AdviceFacts): string {
  switch (facts.code) {
    case 'air-assumed': return 'Nobody has read the air here: the times are for the usual climate.'
    case 'dew-margin': return facts.when === null
      ? 'The air is less than 3 °C above its dew point: hold, water settles on the work.'
      : `Less than 3 °C above the dew point from ${facts.when}: bring it in by then.`
    case 'below-minimum-ahead': return `The room falls under ${degrees(facts.minTempC)} at ${facts.when}, while this is still wet: bring it in by then.`
    case 'chilled': return `Under ${degrees(facts.minTempC)} from ${facts.when} while it was wet: test it or strip it before going on.`
    case 'cold-before-strength': return `The room falls under ${degrees(facts.minTempC)} at ${facts.when}, before the joint has its strength: glue that cold dries weak. Keep it warm until then.`
    case 'too-damp': return `At ${percent(facts.ceiling)} humidity or more no time is promised: dry the room${facts.warmC === null ? '' : `, or warm it to ${degrees(facts.warmC)}`}, to get under it.`
    case 'dry-air': return `The air holds less than ${Number((facts.floor * 1000).toFixed(1))} g of water in a kilogram: this cures from moisture and hardly moves.`
    case 'blush': return `The air is ${degrees(facts.gapC)} above its dew point: the film may haze. Wait, put retarder in, or go on and watch for haze.`
    case 'outside-measured': return `This coat is ${Number(facts.slowness.toFixed(1))} times slower than the sheet's: outside what anybody has measured.`
    case 'outside-sheet': return 'Over three times the longest on the sheet: something is wrong with this coat.'
    case 'fan-early': return facts.when === null ? 'Keep the fan off until it is tack-free.' : `Keep the fan off until it is tack-free, ${facts.when}.`
    case 'covered-early': return `It takes air to harden: do not cover it before ${facts.when}, two days after it went on.`
    case 'forced-drying': return 'Sun or warm air on it: the times are less sure, and nothing is learned from this coat.'
  }
}

// What advice that asks for warm, dry or moving air says instead in a room with a wet solvent film: a heater or a motor there feeds the vapour and can light it.
const besideSolvent = new Map<string, string>(Object.entries({
  'too-damp': 'Too damp for a time to be promised. Wait for drier air: no heater, dehumidifier or fan beside a wet solvent film.',
  'cold-before-strength': 'It turns cold before the joint has its strength: glue that cold dries weak. Take it to a warmer room: no heater beside a wet solvent film.',
} satisfies Partial<Record<AdviceCode, string>>))

/** A piece of advice as it is said beside a wet solvent film. */
export const adviceBesideSolvent = ({ code, text }: { code: string, text: string }) => ({ code, text: besideSolvent.get(code) ?? text })

/** How long a mixed quantity lasts at the room's warmth, against its sheet. Minutes. */
export function potLifeText({ room, minutes, sheetMinutes, tempC }: { room: string, minutes: number, sheetMinutes: number, tempC: number }): string {
  return `${room}, ${degrees(tempC)}: what is mixed lasts about ${Math.round(minutes)} min; the sheet says ${Math.round(sheetMinutes)}. A deep pot goes off sooner.`
}

/** Why a film moves on as it does: "0.41 of sheet speed: 78 % humidity, 18 °C". */
export function rateText(rate: { factor: number, tempC: number, rh: number }): string {
  return `${Number(rate.factor.toFixed(2))} of sheet speed: ${percent(rate.rh)} humidity, ${degrees(rate.tempC)}`
}

const weekdays = ['Sun', 'Mon', 'Tue', 'Wed', 'Thu', 'Fri', 'Sat']

/** A clock time, with its weekday when it is not on the day it is read. `day` counts local days since 1 January 1970. */
export function whenText(day: number, minuteOfDay: number, today: number): string {
  const clock = `${String(Math.floor(minuteOfDay / 60)).padStart(2, '0')}:${String(minuteOfDay % 60).padStart(2, '0')}`
  return day === today ? clock : `${weekdays[(((day + 4) % 7) + 7) % 7]} ${clock}`
}
