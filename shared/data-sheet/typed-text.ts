import type { Dimension } from '#shared/data-sheet/quantity'
import { readQuantity } from '#shared/data-sheet/quantity'
import { fahrenheit } from '#shared/units'
import type { Units } from '#shared/units'

const short = (value: number) => String(Number(value.toPrecision(4)))

function timeText(minutes: number): string {
  if (minutes < 1) return `${short(minutes * 60)} s`
  if (minutes < 90) return `${short(minutes)} min`
  return minutes < 2880 ? `${short(minutes / 60)} h` : `${short(minutes / 1440)} d`
}

/** What one typed in the first place: a figure as `readQuantity` takes it, to four digits. @param value in the dimension's own unit */
export function typedText(value: number, dimension: Dimension, units: Units): string {
  if (dimension === 'time') return timeText(value)
  if (dimension === 'humidity') return `${short(value * 100)} %`
  if (dimension === 'temperature') return units === 'us' ? `${short(fahrenheit(value))} F` : `${short(value)} C`
  const unit = { film: ['µm', 'mil'], spread: ['m2/L', 'sqft/gal'], vapour: ['g/L', 'lb/gal'] }[dimension][units === 'us' ? 1 : 0]!
  const one = readQuantity(`1 ${unit}`, dimension, units)
  return `${short(value / (one.ok ? one.low : 1))} ${unit}`
}
