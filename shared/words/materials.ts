import type { FigureName } from '#shared/library/types'
import type { Driver, MilestoneName, SourceKey } from '#shared/terms'
import { span } from '#shared/time'
import { airflowText, humidityText, temperatureText } from '#shared/units'
import type { Units } from '#shared/units'
import { milestoneText } from '#shared/words/steps'

/** Said beside a caution that a studio wrote itself. */
export const materialCautions = { ownBasis: 'the studio’s own', ownScope: 'this material' } as const

export const materialWords = {
  title: 'Materials',
  intro: 'Times are those of the sheet: a normal coat on a primed ground, in the climate the sheet names. The board reckons with your own air.',
  filter: 'Find by name',
  none: 'No material is called that.',
  noneTitle: 'There are no materials here',
  failed: 'The list of materials could not be fetched.',
  failedOne: 'This material could not be fetched.',
  waiting: 'Fetching the materials',
  waitingOne: 'Fetching the sheet',
  back: 'All materials',
  edition: (no: number) => `edition ${no}`,
  found: (count: number, of: number) => `${count === of ? of : `${count} of ${of}`} ${of === 1 ? 'material' : 'materials'}`,
  ladder: 'How it hardens',
  ladderIntro: 'From the brush to cured. The pale end of each bar is the doubt: quickest, usual and slowest on the sheet.',
  columns: { rung: 'Milestone', low: 'quickest', typical: 'usual', high: 'slowest', driver: 'dries by', test: 'Test by hand', source: 'Where from' },
  windows: 'When the next coat may go on',
  windowShut: 'shut',
  windowOpen: 'open',
  noWindow: 'No window shuts on it: the next coat may go on from “ready to recoat” onwards.',
  noWindowJoint: 'A joint has no window for a next coat.',
  figures: 'Limits and film',
  figure: 'Figure',
  value: 'Value',
  cautions: 'Safety',
  basis: (basis: string, scope: string) => `${basis}; ${scope}`,
  systems: 'With other finishes',
  over: 'When it goes over something',
  under: 'When something goes over it',
  parts: 'What is in the mix',
  part: (name: string, parts: number) => `${name}, ${parts} ${parts === 1 ? 'part' : 'parts'}`,
  hidden: (count: number) => count === 1 ? 'One part is private to the makers.' : `${count} parts are private to the makers.`,
  level: 'It must lie level while it is wet.',
  gloves: (until: MilestoneName) => `Gloves until it is ${milestoneText(until)}.`,
  privatePart: 'private',
  isMix: 'a mix',
  notYours: 'Makers and owners change materials. You may read them.',
} as const

const solvents: Record<string, string> = { 'none': 'no thinner', 'water': 'water-based', 'mineral spirits': 'thinned with mineral spirits', 'turpentine': 'thinned with turpentine', 'alcohol': 'alcohol-based', 'lacquer thinner': 'thinned with lacquer thinner', 'aliphatic solvent': 'thinned with an aliphatic solvent' }
/** "water-based", or the word as it stands when a studio has its own. */
export const solventText = (solvent: string) => solvents[solvent] ?? solvent

const kinds: Record<string, string> = {
  'ground': 'Grounds', 'primer': 'Primers', 'paint': 'Paints', 'enamel': 'Enamels', 'varnish': 'Varnishes', 'oil': 'Oils', 'lacquer': 'Lacquers', 'shellac': 'Shellac', 'resin': 'Resins', 'wax': 'Waxes',
  'size': 'Sizes for leaf', 'glue size': 'Glue sizes', 'bole': 'Bole', 'medium': 'Mediums', 'glue': 'Glues', 'paste': 'Pastes',
}
/** In the order a piece meets them. */
export const kindOrder: readonly string[] = Object.keys(kinds)
export const kindText = (kind: string) => kinds[kind] ?? kind

const drivers: Record<Driver, string> = {
  water: 'losing water', joint: 'losing water into the joint', solvent: 'losing solvent', oxidation: 'taking in air', reaction: 'the hardener', coalescence: 'growing together as it warms', moisture: 'water from the air', gel: 'cooling',
}
export const driverText = (driver: Driver) => drivers[driver]

const names: Record<FigureName, string> = {
  'reference temperature': 'The sheet’s temperature', 'reference humidity': 'The sheet’s humidity', 'minimum temperature': 'Not below', 'maximum temperature': 'Not above', 'humidity ceiling': 'Not damper than', 'dry-air floor': 'Hardly cures in air drier than',
  'open time': 'Open time', 'closed assembly': 'Closed assembly', 'working time': 'Working time', 'pot life': 'Pot life', 'wet film': 'Wet film', 'spread rate': 'Covers', 'VOC': 'VOC', 'thickness exponent': 'A thicker film takes longer by the power of',
}
export const figureName = (name: FigureName) => names[name]

/** How well a source is known that does not name a paper somebody has read. */
const keys: Record<Exclude<SourceKey, 'S' | 'S-'>, string> = { 'M': 'from memory, not checked', 'CP': 'common practice', 'calc': 'worked out', 'planning value': 'a planning value of ours', 'own': 'the studio’s own' }

/** "maker’s data sheet, wood glue, seen"; how well it is known is added only where the source does not say so itself. */
export function sourceText({ source, key }: { source: string, key: SourceKey }): string {
  if (key === 'S') return source
  if (key === 'S-') return `${source} (second hand)`
  if (key === 'planning value' && source === 'planning value') return keys[key]
  const [first = ''] = keys[key].split(',')
  return source.includes(first) ? source : `${source} (${keys[key]})`
}

/** A time from 10 seconds to a year, as a sheet would say it: "20 min", "4 h", "36 h", "3 days". Minutes. */
export function sheetTime(minutes: number): string {
  if (minutes < 1) return `${Math.round(minutes * 60)} s`
  if (minutes >= 2880) return `${Number((minutes / 1440).toFixed(minutes < 14_400 ? 1 : 0))} days`
  return minutes > 90 ? `${Number((minutes / 60).toFixed(1))} h` : span(minutes)
}

/** "1 h, between 30 min and 2 h". */
export function timeRange({ low, typical, high }: { low: number, typical: number, high: number }): string {
  return low === high ? sheetTime(typical) : `${sheetTime(typical)}, ${betweenText(sheetTime(low), sheetTime(high))}`
}

/** "between 50 and 120 µm": a unit that both ends share is said once. */
function betweenText(low: string, high: string): string {
  const [, figure, unit] = /^(\S+) (\D+)$/.exec(low) ?? []
  return `between ${unit !== undefined && figure !== undefined && high.replace(/^\S+ /, '') === unit ? figure : low} and ${high}`
}

const figure = (value: number) => String(Number(value.toPrecision(3)))

function oneFigure(value: number, unit: string, units: Units): string {
  switch (unit) {
    case 'C': return temperatureText(value, units)
    case 'share': return humidityText(value)
    case 'kg/kg': return `${figure(value * 1000)} g of water per kg of air`
    case 'min': return sheetTime(value)
    case 'm2/L': return units === 'us' ? `${figure(value * 40.746)} sq ft per gallon` : `${figure(value)} m² per litre`
    case 'µm': return units === 'us' ? `${figure(value / 25.4)} mil` : `${figure(value)} µm`
    case 'g/L': return units === 'us' ? `${figure(value / 119.826)} lb per gallon` : `${figure(value)} g per litre`
    case 'm3/h': return airflowText(value, units)
    default: return figure(value)
  }
}

/** A figure of the sheet in the studio's units: "80 µm, between 50 and 120 µm". */
export function figureText({ low, typical, high, unit }: { low: number | null, typical: number, high: number | null, unit: string }, units: Units): string {
  const middle = oneFigure(typical, unit, units)
  return low === null || high === null || low === high ? middle : `${middle}, ${betweenText(oneFigure(low, unit, units), oneFigure(high, unit, units))}`
}

interface WindowEnds { fromMin: number | null, toMin: number | null, recovery: string | null }

/** What the windows of a material allow and forbid, one sentence after the other. */
export function windowSentences(windows: readonly WindowEnds[]): string[] {
  return windows.flatMap(({ fromMin, toMin, recovery }, index) => {
    const from = fromMin === null || fromMin === 0 ? 'at once' : `from ${sheetTime(fromMin)}`
    const opens = toMin === null ? `The next coat may go on ${from} onwards.` : `The next coat may go on ${from} until ${sheetTime(toMin)}.`
    const next = windows[index + 1]
    if (toMin === null) return [opens]
    const missed = recovery === null ? '' : ` Missed it: ${recovery.charAt(0).toLowerCase()}${recovery.slice(1)}.`
    const shut = next ? `Between ${sheetTime(toMin)} and ${sheetTime(next.fromMin ?? toMin)} it must be left alone.` : `After ${sheetTime(toMin)} the window is shut.`
    return [opens, `${shut}${missed}`]
  })
}
