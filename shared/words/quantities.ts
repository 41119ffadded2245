import type { Dimension } from '#shared/data-sheet/quantity'
import type { Units } from '#shared/units'
import { figureText, sheetTime } from '#shared/words/materials'

const unitOf: Record<Exclude<Dimension, 'time'>, string> = { temperature: 'C', humidity: 'share', film: 'µm', spread: 'm2/L', vapour: 'g/L' }

/** A figure of a data sheet in the studio's units: "2 h", "23 °C", "10 m² per litre". @param value in the dimension's own unit */
export function quantityText(value: number, dimension: Dimension, units: Units): string {
  return dimension === 'time' ? sheetTime(value) : figureText({ low: null, typical: value, high: null, unit: unitOf[dimension] }, units)
}
