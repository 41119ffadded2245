import type { Units } from '#shared/units'

/** What a figure of a data sheet measures, and the unit it is kept in: minutes, °C, a share, µm, m2/L, g/L. */
export type Dimension = 'time' | 'temperature' | 'humidity' | 'film' | 'spread' | 'vapour'

type Quantity = { ok: true, low: number, high: number } | { ok: false, why: 'unread' | 'no unit' | 'order' }

/** kg/L: what a gram on a square metre is taken at, as sheets that weigh seldom tell the density. A planning value. */
const assumedDensity = 1.1

/** One US gallon, 3.785411784 L exactly; one pound avoirdupois, 453.59237 g exactly; one foot, 0.3048 m exactly. */
const litresPerGallon = 3.785411784
const gramsPerPound = 453.59237
const gallonSpread = 0.3048 ** 2 / litresPerGallon

type Turn = (value: number) => number
const by = (factor: number): Turn => value => value * factor

/** Units as sheets print them, without spaces, dots, exponents and the plural's s. */
const units: Record<Dimension, Record<string, Turn>> = {
  time: {
    's': by(1 / 60), 'sec': by(1 / 60), 'second': by(1 / 60), 'm': by(1), 'min': by(1), 'minute': by(1), 'h': by(60), 'hr': by(60), 'hour': by(60),
    'd': by(1440), 'day': by(1440), 'w': by(10_080), 'wk': by(10_080), 'week': by(10_080), 'month': by(43_200),
  },
  temperature: { c: by(1), f: value => (value - 32) * 5 / 9 },
  humidity: { '%': by(0.01), '%rh': by(0.01), 'rh': by(0.01) },
  film: { µm: by(1), um: by(1), my: by(1), micron: by(1), mm: by(1000), mil: by(25.4), thou: by(25.4) },
  spread: {
    'm2/l': by(1), 'sqm/l': by(1), 'm2/litre': by(1), 'm2/liter': by(1), 'ft2/gal': by(gallonSpread), 'sqft/gal': by(gallonSpread), 'ft2/gallon': by(gallonSpread), 'sqft/gallon': by(gallonSpread),
    'g/m2': value => assumedDensity * 1000 / value, 'gsm': value => assumedDensity * 1000 / value,
  },
  vapour: { 'g/l': by(1), 'g/litre': by(1), 'g/liter': by(1), 'lb/gal': by(gramsPerPound / litresPerGallon), 'lb/gallon': by(gramsPerPound / litresPerGallon), 'oz/gal': by(gramsPerPound / 16 / litresPerGallon), 'oz/gallon': by(gramsPerPound / 16 / litresPerGallon) },
}

/** What a number without a unit is taken in. A time has none: minutes for hours would be believed. */
const bare: Record<Dimension, Record<Units, string | null>> = {
  time: { metric: null, us: null }, temperature: { metric: 'c', us: 'f' }, humidity: { metric: '%', us: '%' },
  film: { metric: 'µm', us: 'mil' }, spread: { metric: 'm2/l', us: 'ft2/gal' }, vapour: { metric: 'g/l', us: 'lb/gal' },
}

const tidy = (text: string) => text.trim().toLowerCase().replaceAll('μ', 'µ').replaceAll('²', '2').replaceAll('½', '.5').replace(/(\d),(\d)/g, '$1.$2').replace(/°\s*/g, '')
  .replace(/^(?:about|approximately|approx\.?|circa|ca\.?|up to|at least|not less than|minimum|min\.?(?=\s*\d)|maximum|max\.?|from|after|[~<>≤≥])\s*/, '')

const number = String.raw`(-?\d*\.?\d+)`
const unitLetters = String.raw`([^\d.\s-][^-]*)?`
const one = new RegExp(`^${number}\\s*${unitLetters}$`)

function unitOf(word: string | undefined, dimension: Dimension): Turn | null {
  const plain = (word ?? '').replace(/[\s^.]/g, '')
  const known = units[dimension]
  return known[plain] ?? known[plain.replace(/s(?=$|\/)/g, '')] ?? null
}

/** "2 h 30 min" and "1h30": hours with minutes behind them. */
function hoursAndMinutes(text: string): number | null {
  const found = /^(\d+)\s*h(?:ours?|rs?)?\s*(\d{1,2})\s*(?:m|min|mins|minutes?)?$/.exec(text)
  return found ? Number(found[1]) * 60 + Number(found[2]) : null
}

interface Side { value: number, unit: string | undefined }

function sideOf(text: string): Side | null {
  const found = one.exec(text)
  return found ? { value: Number(found[1]), unit: found[2] } : null
}

/** The two sides of "2-4 h", "2 to 4 hours", "1 h - 2 h"; one figure is both. A sign before a number is no range. */
function sidesOf(text: string): [Side, Side] | null {
  const parts = text.split(/(?<=[\da-z%µ])\s*(?:-|–|—|\bto\b|\buntil\b)\s*(?=[\d.-])/)
  if (parts.length > 2) return null
  const sides = parts.map(sideOf)
  const [first, second = first] = sides
  return first && second ? [first, second] : null
}

/**
 * Reads a figure as somebody types it from a data sheet: "30 min", "2-4 h", "1h30", "23 °C", "73 F", "3 mil", "350 g/L", "400 sq ft/gal".
 * @param system what a temperature, film, spread or vapour without a unit is taken in; a time always needs its unit
 * @returns both ends in the dimension's own unit, equal when one was typed
 */
export function readQuantity(text: string, dimension: Dimension, system: Units): Quantity {
  const plain = tidy(text)
  const compound = dimension === 'time' ? hoursAndMinutes(plain) : null
  if (compound !== null) return { ok: true, low: compound, high: compound }
  const sides = sidesOf(plain)
  if (!sides) return { ok: false, why: 'unread' }
  const [first, second] = sides
  const common = second.unit ?? first.unit ?? bare[dimension][system] ?? undefined
  if (common === undefined) return { ok: false, why: 'no unit' }
  const [low, high] = [[first.value, unitOf(first.unit ?? common, dimension)], [second.value, unitOf(second.unit ?? common, dimension)]].map(([value, turn]) => typeof turn === 'function' ? turn(value as number) : null)
  if (low === null || low === undefined || high === null || high === undefined || !Number.isFinite(low) || !Number.isFinite(high)) return { ok: false, why: 'unread' }
  // Grams on a square metre turn round: more of them is less of a square metre.
  const turned = dimension === 'spread' && first.value < second.value && low > high
  if (low > high && !turned) return { ok: false, why: 'order' }
  return { ok: true, low: Math.min(low, high), high: Math.max(low, high) }
}
