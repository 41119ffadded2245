import { article, memory, practice, sheet, tradePage } from '#shared/library/build'
import { libraryMaterials } from '#shared/library/index'
import type { LibraryMaterial, Sourced } from '#shared/library/types'

/** How long one material must have lain before another goes over it. `minMin` null: never. Minutes at the reference climate. */
export interface SystemRule extends Sourced {
  name: string
  /** Library keys of the materials below and above. */
  under: readonly string[]
  over: readonly string[]
  minMin: number | null
  recommendedMin: number | null
  bestMin: number | null
  text: string
}

const hour = 60
const day = 1440
const keysOf = (wanted: (material: LibraryMaterial) => boolean) => libraryMaterials.filter(wanted).map(material => material.key)

const open = (material: LibraryMaterial) => material.film === 'open'
const waterCoats = keysOf(m => open(m) && m.solvent === 'water' && m.kind !== 'size')
const oilCoats = keysOf(m => open(m) && m.dryingOil && m.kind !== 'size')
const varnishes = keysOf(m => m.kind === 'varnish' || m.kind === 'lacquer')
const paints = keysOf(m => m.kind === 'paint' || m.kind === 'enamel')
const notWax = keysOf(m => open(m) && m.kind !== 'wax')

/** Which material may follow which, and after how long. Several may speak of one pair: the longest wait holds. */
export const systemRules: readonly SystemRule[] = [
  {
    name: 'oil paint over acrylic gesso', under: ['acrylic-gesso'], over: ['artists-oil'], minMin: 72 * hour, recommendedMin: 14 * day, bestMin: 30 * day,
    text: 'Under oil paint, acrylic gesso wants three days at least. Two weeks is better.', ...article('acrylic gesso under oil paint'),
  },
  {
    name: 'acrylic paint over acrylic gesso', under: ['acrylic-gesso'], over: ['heavy-body-acrylic', 'craft-acrylic'], minMin: hour, recommendedMin: 8 * hour, bestMin: null,
    text: 'Acrylic paint goes on gesso once the gesso no longer lifts. Overnight is better.', ...article('acrylic gesso under acrylic paint'),
  },
  {
    name: 'gesso over a sizing layer', under: ['acrylic-size'], over: ['acrylic-gesso'], minMin: 8 * hour, recommendedMin: 12 * hour, bestMin: null,
    text: 'Leave a sizing layer overnight before gesso.', ...article('acrylic size under gesso'),
  },
  {
    name: 'oil-based over water-based', under: waterCoats, over: oilCoats, minMin: 24 * hour, recommendedMin: null, bestMin: null,
    text: 'Oil-based over water-based: wait a day.', ...sheet('water-based and oil-based finishes'),
  },
  {
    name: 'water-based over oil-based', under: oilCoats, over: waterCoats, minMin: 72 * hour, recommendedMin: null, bestMin: null,
    text: 'Water-based over oil-based: wait three days.', ...sheet('water-based and oil-based finishes'),
  },
  {
    name: 'varnish over an acrylic painting', under: ['heavy-body-acrylic'], over: varnishes, minMin: 7 * day, recommendedMin: 14 * day, bestMin: 42 * day,
    text: 'Varnish over an acrylic painting: a week at least, longer where it is thick.', ...tradePage('acrylic painting'),
  },
  {
    name: 'varnish over thin acrylic paint', under: ['craft-acrylic'], over: varnishes, minMin: day, recommendedMin: 3 * day, bestMin: null,
    text: 'Varnish over thin acrylic paint: a day at least.', ...memory,
  },
  {
    name: 'varnish over an oil painting', under: ['artists-oil'], over: varnishes, minMin: 180 * day, recommendedMin: 270 * day, bestMin: 365 * day,
    text: 'Varnish over an oil painting: half a year at least, a year where it is thick.', ...sheet('artists’ oil paint'),
  },
  {
    name: 'wax over paint', under: paints, over: ['wax'], minMin: day, recommendedMin: 3 * day, bestMin: null,
    text: 'Wax too early lifts paint: wait a day.', ...tradePage('chalk-type paint'),
  },
  {
    name: 'nothing over wax', under: ['wax'], over: notWax, minMin: null, recommendedMin: null, bestMin: null,
    text: 'Nothing sticks on top of wax.', ...practice,
  },
]

/** The rules that speak of laying `over` on `under`, both library keys. */
export function systemRulesFor(under: string, over: string): SystemRule[] {
  return systemRules.filter(rule => rule.under.includes(under) && rule.over.includes(over))
}
