import type { Solvent, Sourced } from '#shared/library/types'
import { explosiveGramsPerM3, mgPerM3 } from '#shared/vapour/concentration'
import type { TextOnlyReason, VapourLimits } from '#shared/vapour/types'

/** One figure with the kind of its source, its material and how far to trust it. */
export interface SolventFigure extends Sourced { value: number }

export interface ExposureLimit extends Sourced { over: '8 hours' | '15 minutes', value: number, unit: 'ppm' | 'mg/m3' }

/** Why a solvent is spoken of in words only, with where that comes from. */
export interface TextOnly extends Sourced { reason: TextOnlyReason }

/**
 * A solvent as hazard guides give it. `density` g/mL near 20 °C, `vapourPressure` mmHg at 20 °C, `evaporationRate` with n-butyl acetate as 1,
 * `explosivePercent` the lowest lower explosive limit found, per cent by volume, `flashPointC` closed cup, the lowest found. Null: none found.
 */
export interface LibrarySolvent {
  key: string
  name: string
  also: readonly string[]
  cas: string
  gramsPerMole: SolventFigure
  density: SolventFigure
  vapourPressure: SolventFigure | null
  evaporationRate: SolventFigure | null
  explosivePercent: SolventFigure
  flashPointC: SolventFigure | null
  limits: readonly ExposureLimit[]
  textOnly: TextOnly | null
}

const guide = (material: string): Sourced => ({ source: `chemical hazard guide, ${material}, seen`, key: 'S' })
const tables = (material: string): Sourced => ({ source: `table of physical constants, ${material}, seen`, key: 'S' })
const list = (material: string): Sourced => ({ source: `workplace limit list, ${material}, seen`, key: 'S' })
const rates = (material: string): Sourced => ({ source: `evaporation rate table, ${material}, seen`, key: 'S-' })
const memory: Sourced = { source: 'from memory: check the data sheet', key: 'M' }
const computed: Sourced = { source: 'vapour pressure equation, computed', key: 'calc' }
const planned: Sourced = { source: 'planning value', key: 'planning value' }

const of = (value: number, from: Sourced): SolventFigure => ({ value, ...from })
const day = (value: number, from: Sourced, unit: 'ppm' | 'mg/m3' = 'ppm'): ExposureLimit => ({ over: '8 hours', value, unit, ...from })
const short = (value: number, from: Sourced, unit: 'ppm' | 'mg/m3' = 'ppm'): ExposureLimit => ({ over: '15 minutes', value, unit, ...from })

/** Every figure found is kept; where sources differ the lowest explosive limit and flash point stand, and `limitsOf` takes the strictest limits. */
export const librarySolvents: readonly LibrarySolvent[] = [
  {
    key: 'ethanol', name: 'Ethanol', also: ['alcohol', 'denatured alcohol', 'methylated spirit'], cas: '64-17-5',
    gramsPerMole: of(46.07, tables('ethanol')), density: of(0.789, tables('ethanol')), vapourPressure: of(44, guide('ethanol')), evaporationRate: of(1.4, rates('ethanol')),
    explosivePercent: of(3.1, tables('ethanol')), flashPointC: of(12, guide('ethanol')),
    limits: [day(1000, list('ethanol')), short(1000, list('ethanol'))], textOnly: null,
  },
  {
    key: 'isopropanol', name: 'Isopropanol', also: ['isopropyl alcohol', '2-propanol'], cas: '67-63-0',
    gramsPerMole: of(60.1, tables('isopropanol')), density: of(0.781, tables('isopropanol')), vapourPressure: of(33, guide('isopropanol')), evaporationRate: of(1.7, rates('isopropanol')),
    explosivePercent: of(2, guide('isopropanol')), flashPointC: of(12, guide('isopropanol')),
    limits: [day(400, list('isopropanol')), day(200, list('isopropanol')), short(500, list('isopropanol')), short(400, list('isopropanol'))], textOnly: null,
  },
  {
    key: 'acetone', name: 'Acetone', also: [], cas: '67-64-1',
    gramsPerMole: of(58.08, tables('acetone')), density: of(0.785, tables('acetone')), vapourPressure: of(185, computed), evaporationRate: of(5.6, rates('acetone')),
    explosivePercent: of(2.5, guide('acetone')), flashPointC: of(-20, guide('acetone')),
    limits: [day(1000, list('acetone')), day(500, list('acetone')), day(250, list('acetone')), short(750, list('acetone')), short(500, memory)], textOnly: null,
  },
  {
    key: 'mineral-spirits', name: 'Mineral spirits', also: ['white spirit', 'stoddard solvent', 'stoddard'], cas: '8052-41-3',
    gramsPerMole: of(128, guide('mineral spirits')), density: of(0.78, memory), vapourPressure: of(2, memory), evaporationRate: of(0.1, rates('mineral spirits')),
    explosivePercent: of(0.8, memory), flashPointC: of(39, memory),
    limits: [day(500, list('mineral spirits')), day(200, list('mineral spirits')), day(350, list('mineral spirits'), 'mg/m3'), short(1800, list('mineral spirits'), 'mg/m3')], textOnly: null,
  },
  {
    key: 'odourless-mineral-spirits', name: 'Odourless mineral spirits', also: ['odorless mineral spirits', 'odourless white spirit'], cas: '64742-48-9',
    gramsPerMole: of(150, memory), density: of(0.75, memory), vapourPressure: of(1, memory), evaporationRate: of(0.1, memory),
    explosivePercent: of(0.6, memory), flashPointC: of(40, memory),
    limits: [day(350, planned, 'mg/m3'), short(1800, planned, 'mg/m3')], textOnly: null,
  },
  {
    key: 'turpentine', name: 'Turpentine', also: ['gum turpentine', 'turps'], cas: '8006-64-2',
    gramsPerMole: of(136, guide('turpentine')), density: of(0.86, guide('turpentine')), vapourPressure: of(4, guide('turpentine')), evaporationRate: of(0.4, memory),
    explosivePercent: of(0.8, guide('turpentine')), flashPointC: of(35, guide('turpentine')),
    limits: [day(100, list('turpentine'))], textOnly: { reason: 'sensitising', ...memory },
  },
  {
    key: 'limonene', name: 'Limonene', also: ['d-limonene', 'citrus solvent', 'orange terpene'], cas: '5989-27-5',
    gramsPerMole: of(136.2, tables('limonene')), density: of(0.841, tables('limonene')), vapourPressure: of(1.5, guide('limonene')), evaporationRate: of(0.2, memory),
    explosivePercent: of(0.7, guide('limonene')), flashPointC: of(48, guide('limonene')),
    limits: [day(30, list('limonene')), day(5, list('limonene'))], textOnly: { reason: 'sensitising', ...memory },
  },
  {
    key: 'toluene', name: 'Toluene', also: [], cas: '108-88-3',
    gramsPerMole: of(92.14, tables('toluene')), density: of(0.862, tables('toluene')), vapourPressure: of(21, guide('toluene')), evaporationRate: of(1.9, memory),
    explosivePercent: of(1, tables('toluene')), flashPointC: of(4, guide('toluene')),
    limits: [day(200, list('toluene')), day(100, list('toluene')), day(20, list('toluene')), short(150, list('toluene'))], textOnly: null,
  },
  {
    key: 'xylene', name: 'Xylene, mixed', also: ['xylol', 'xylenes'], cas: '1330-20-7',
    gramsPerMole: of(106.2, tables('xylene')), density: of(0.86, tables('xylene')), vapourPressure: of(6.2, computed), evaporationRate: of(0.7, rates('xylene')),
    explosivePercent: of(0.9, guide('xylene')), flashPointC: of(25, guide('xylene')),
    limits: [day(100, list('xylene')), day(20, memory), short(150, list('xylene'))], textOnly: null,
  },
  {
    key: 'butyl-acetate', name: 'n-Butyl acetate', also: ['n-butyl acetate'], cas: '123-86-4',
    gramsPerMole: of(116.16, tables('butyl acetate')), density: of(0.883, tables('butyl acetate')), vapourPressure: of(9.3, computed), evaporationRate: of(1, { source: 'by definition', key: 'calc' }),
    explosivePercent: of(1.2, tables('butyl acetate')), flashPointC: of(22, guide('butyl acetate')),
    limits: [day(150, list('butyl acetate')), day(50, list('butyl acetate')), short(200, list('butyl acetate')), short(150, list('butyl acetate'))], textOnly: null,
  },
  {
    key: 'ethyl-acetate', name: 'Ethyl acetate', also: [], cas: '141-78-6',
    gramsPerMole: of(88.1, tables('ethyl acetate')), density: of(0.9, tables('ethyl acetate')), vapourPressure: of(73.7, computed), evaporationRate: of(2.8, rates('ethyl acetate')),
    explosivePercent: of(2, guide('ethyl acetate')), flashPointC: of(-4, guide('ethyl acetate')),
    limits: [day(400, list('ethyl acetate'))], textOnly: null,
  },
  {
    key: 'butanone', name: 'Butanone', also: ['mek', 'methyl ethyl ketone', '2-butanone'], cas: '78-93-3',
    gramsPerMole: of(72.1, tables('butanone')), density: of(0.8, tables('butanone')), vapourPressure: of(70.7, computed), evaporationRate: of(3.8, rates('butanone')),
    explosivePercent: of(1.4, guide('butanone')), flashPointC: of(-10, guide('butanone')),
    limits: [day(200, list('butanone')), short(300, list('butanone'))], textOnly: null,
  },
  {
    key: 'propylene-glycol-methyl-ether', name: 'Propylene glycol methyl ether', also: ['propylene glycol monomethyl ether', '1-methoxy-2-propanol'], cas: '107-98-2',
    gramsPerMole: of(90.1, tables('propylene glycol methyl ether')), density: of(0.962, tables('propylene glycol methyl ether')), vapourPressure: of(12, guide('propylene glycol methyl ether')), evaporationRate: of(0.7, memory),
    explosivePercent: of(1.6, memory), flashPointC: of(32, guide('propylene glycol methyl ether')),
    limits: [day(100, list('propylene glycol methyl ether')), short(150, list('propylene glycol methyl ether'))], textOnly: null,
  },
  {
    key: '2-butoxyethanol', name: '2-Butoxyethanol', also: ['butyl glycol', 'ethylene glycol butyl ether'], cas: '111-76-2',
    gramsPerMole: of(118.2, tables('2-butoxyethanol')), density: of(0.902, tables('2-butoxyethanol')), vapourPressure: of(0.8, memory), evaporationRate: of(0.08, memory),
    explosivePercent: of(1.1, guide('2-butoxyethanol')), flashPointC: of(61, guide('2-butoxyethanol')),
    limits: [day(50, list('2-butoxyethanol')), day(20, list('2-butoxyethanol')), day(5, list('2-butoxyethanol'))], textOnly: { reason: 'skin', ...list('2-butoxyethanol') },
  },
  {
    key: 'methanol', name: 'Methanol', also: ['methyl alcohol', 'wood alcohol'], cas: '67-56-1',
    gramsPerMole: of(32.04, tables('methanol')), density: of(0.791, tables('methanol')), vapourPressure: of(97, computed), evaporationRate: of(3, rates('methanol')),
    explosivePercent: of(6, guide('methanol')), flashPointC: of(9, guide('methanol')),
    limits: [day(200, list('methanol')), short(250, list('methanol'))], textOnly: { reason: 'skin', ...list('methanol') },
  },
  {
    key: 'naphtha', name: 'Naphtha', also: ['painters naphtha', 'aliphatic solvent'], cas: '8032-32-4',
    gramsPerMole: of(87, guide('naphtha')), density: of(0.76, guide('naphtha')), vapourPressure: of(20, guide('naphtha')), evaporationRate: of(1.4, rates('naphtha')),
    explosivePercent: of(1.2, guide('naphtha')), flashPointC: of(-7, guide('naphtha')),
    limits: [day(350, list('naphtha'), 'mg/m3'), short(1800, list('naphtha'), 'mg/m3')], textOnly: null,
  },
  {
    key: 'petroleum-distillates', name: 'Petroleum distillates', also: ['petroleum spirit'], cas: '8002-05-9',
    gramsPerMole: of(99, guide('petroleum distillates')), density: of(0.66, guide('petroleum distillates')), vapourPressure: of(40, guide('petroleum distillates')), evaporationRate: null,
    explosivePercent: of(1.1, guide('petroleum distillates')), flashPointC: of(-66, guide('petroleum distillates')),
    limits: [day(500, list('petroleum distillates')), day(350, list('petroleum distillates'), 'mg/m3'), short(1800, list('petroleum distillates'), 'mg/m3')], textOnly: null,
  },
  {
    key: 'dichloromethane', name: 'Dichloromethane', also: ['methylene chloride'], cas: '75-09-2',
    gramsPerMole: of(84.9, tables('dichloromethane')), density: of(1.327, tables('dichloromethane')), vapourPressure: of(356, computed), evaporationRate: of(14, memory),
    explosivePercent: of(13, tables('dichloromethane')), flashPointC: null,
    limits: [day(25, list('dichloromethane')), day(2, list('dichloromethane')), short(125, list('dichloromethane')), short(16, list('dichloromethane'))], textOnly: { reason: 'carcinogenic', ...memory },
  },
]

const plain = (word: string) => word.trim().toLowerCase().replaceAll('-', ' ')

/** A solvent by its key, its name or another name on a can, or null. Capitals and hyphens do not matter. */
export function findSolvent(word: string): LibrarySolvent | null {
  const wanted = plain(word)
  return librarySolvents.find(({ key, name, also }) => [key, name, ...also].some(one => plain(one) === wanted)) ?? null
}

/** A limit in mg/m3, at 25 °C as the published limits are converted. */
export function limitMgPerM3(solvent: LibrarySolvent, limit: ExposureLimit): number {
  return limit.unit === 'mg/m3' ? limit.value : mgPerM3(limit.value, solvent.gramsPerMole.value)
}

/** The strictest limit over a time, or null where none was found. The one that stands carries the source to show. */
export function strictestLimit(solvent: LibrarySolvent, over: ExposureLimit['over']): ExposureLimit | null {
  const found = solvent.limits.filter(limit => limit.over === over).sort((a, b) => limitMgPerM3(solvent, a) - limitMgPerM3(solvent, b))
  return found[0] ?? null
}

/** g/m3 of a solvent's lowest explosive limit. */
export function solventExplosiveGramsPerM3(solvent: LibrarySolvent): number {
  return explosiveGramsPerM3(solvent.explosivePercent.value, solvent.gramsPerMole.value)
}

/** g/m3: the lowest explosive limit of the whole table, for a vapour of which nobody knows it. */
export const lowestExplosiveGramsPerM3 = Math.min(...librarySolvents.map(solventExplosiveGramsPerM3))

/** What an owner has read in section 8 and 9 of the data sheet; null where it says nothing. */
export interface SheetLimits { limitMgM3: number | null, ceilingMgM3: number | null, lelGramsM3: number | null }

/** What the room sums need of a solvent: the owner's own figures from the data sheet win, else the strictest of the table. */
export function limitsOf(solvent: LibrarySolvent, sheet: SheetLimits = { limitMgM3: null, ceilingMgM3: null, lelGramsM3: null }): VapourLimits {
  const inTable = (over: ExposureLimit['over']) => {
    const limit = strictestLimit(solvent, over)
    return limit === null ? null : limitMgPerM3(solvent, limit)
  }
  return {
    limitMgM3: sheet.limitMgM3 ?? inTable('8 hours'),
    ceilingMgM3: sheet.ceilingMgM3 ?? inTable('15 minutes'),
    lelGramsM3: sheet.lelGramsM3 ?? solventExplosiveGramsPerM3(solvent),
    textOnly: solvent.textOnly?.reason ?? null,
  }
}

/**
 * The solvent a material's kind is counted as when its data sheet was not read: the strictest that is usual in it, which the screen calls assumed.
 * Null for water and for what holds no solvent: nothing usual can be named, and an unknown limit asks for the unknown band.
 */
export function assumedSolvent(solvent: Solvent): LibrarySolvent | null {
  const keys: Record<Solvent, string | null> = {
    'water': null, 'none': null, 'mineral spirits': 'mineral-spirits', 'turpentine': 'turpentine', 'alcohol': 'isopropanol', 'lacquer thinner': 'toluene', 'aliphatic solvent': 'naphtha',
  }
  const key = keys[solvent]
  return key === null ? null : findSolvent(key)
}
