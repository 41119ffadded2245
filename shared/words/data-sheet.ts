import type { Hardening } from '#shared/data-sheet/hardening'
import type { Dimension } from '#shared/data-sheet/quantity'
import type { SheetField } from '#shared/data-sheet/fields'
import type { MaterialKind, Solvent } from '#shared/library/types'
import type { Content } from '#shared/library/required-cautions'
import type { Units } from '#shared/units'

const labels: Record<SheetField, string> = {
  'spread rate': 'Coverage', 'wet film': 'Wet film', 'VOC': 'VOC', 'reference temperature': 'Temperature of its times', 'reference humidity': 'Humidity of its times',
  'open time': 'Open time', 'closed assembly': 'Closed assembly', 'at-tack': 'Ready for leaf', 'set-to-touch': 'Set to touch', 'dust-free': 'Dust-free', 'tack-free': 'Tack-free', 'dry-to-handle': 'Dry to handle',
  'ready-to-recoat': 'Recoat, earliest', 'recoat until': 'Recoat, latest', 'dry-to-sand-lightly': 'Dry to sand', 'dry-to-sand-flat': 'Dry to sand flat', 'out-of-clamps': 'Clamp time', 'full-strength': 'Full strength', 'cured': 'Full cure',
  'pot life': 'Pot life', 'working time': 'Working time', 'minimum temperature': 'Lowest temperature', 'maximum temperature': 'Highest temperature', 'humidity ceiling': 'Highest humidity',
}
/** The label of a data sheet's field. */
export const sheetFieldText = (field: SheetField) => labels[field]

const examples: Record<Dimension, Record<Units, string>> = {
  time: { metric: '30 min, 2-4 h or 7 d', us: '30 min, 2-4 h or 7 d' },
  temperature: { metric: '23 or 73 F', us: '73 or 23 C' },
  humidity: { metric: '50 or 40-60 %', us: '50 or 40-60 %' },
  film: { metric: '100 µm or 4 mil', us: '4 mil or 100 µm' },
  spread: { metric: '10 m2/L, 110 g/m2 or 400 sqft/gal', us: '400 sqft/gal or 10 m2/L' },
  vapour: { metric: '350 g/L or 2.9 lb/gal', us: '2.9 lb/gal or 350 g/L' },
}
/** How a figure of this kind is typed. */
export const exampleText = (dimension: Dimension, units: Units) => examples[dimension][units]

/** Why a typed figure is not taken: each names its field and what was expected. */
export const sheetRefusals = {
  unread: (label: string, example: string) => `${label}: this cannot be read. Type it like ${example}, or leave it empty when it is not on the sheet.`,
  noUnit: (label: string) => `${label}: say min, h or d, such as 30 min or 2-4 h.`,
  order: (label: string) => `${label}: the first figure is larger than the second. Type the smaller first.`,
  range: (label: string, least: string, most: string, typed: string) => `${label}: ${typed} is not between ${least} and ${most}. Check the unit.`,
  recoatOrder: 'Recoat, latest: it must come after the earliest. Leave it empty when the sheet gives none.',
  temperatureOrder: 'Highest temperature: it must be above the lowest.',
  coldSheet: 'Temperature of its times: it is below the lowest temperature given. One of the two is wrong.',
  cureOrder: (label: string) => `Full cure: it comes before “${label}”. Check both.`,
  strengthOrder: 'Full strength: it comes before the clamp time. Check both.',
  rungOrder: (label: string) => `${label}: give the quickest, the usual and the slowest in that order, or the usual alone.`,
  noRungs: 'Give at least one time: a material without any cannot be foretold.',
  noUsual: (label: string) => `${label}: the usual figure is missing. Without it, leave all three empty.`,
  name: 'Name: give it a name, at most 80 characters.',
  nameTaken: 'Name: another material here is called that. Give it another name.',
  kind: 'What it is: choose a kind, such as varnish or glue.',
  hardening: 'How it hardens: choose one. The sheet says it under “description” or “composition”.',
  solvent: 'Thinned with: choose one of the list.',
  contents: 'What it holds: choose from the list.',
  kindHardening: (kind: string, hardening: string) => `How it hardens: ${kind} is not known to harden by “${hardening}”. Choose another.`,
  text: 'At most 200 characters.',
  recovery: 'When the window was missed: say in at most 80 characters what must be done.',
  recoveryMin: 'Minutes a piece: a whole number from 0 to 600.',
  edition: (no: number) => `Somebody saved edition ${no} meanwhile. Yours is still here: look at theirs, then save again.`,
  noEdition: 'There is no edition of that number.',
  sameEdition: 'That is the edition in use.',
  nothing: 'Nothing was changed.',
  asked: (name: string) => `A finishing schedule asks for ${name}. Change the schedule first.`,
  wentBack: (no: number) => `Back to edition ${no}`,
  archived: 'It has been put away. Bring it back first.',
} as const

const hardeningNames: Record<Hardening, string> = {
  'water': 'Water leaves it: acrylic, latex, PVA, paste', 'solvent': 'Its thinner leaves it: shellac, lacquer, wax', 'oil': 'It takes in air: oil, alkyd, oil varnish',
  'epoxy': 'Resin and hardener: epoxy', 'isocyanate': 'Two parts, isocyanate hardener', 'two parts': 'Two parts, hardener not named', 'moisture': 'Moisture from the air: polyurethane', 'instant': 'Instant glue: cyanoacrylate', 'cooling': 'It sets as it cools: hide glue, gelatine',
}
export const hardeningText = (hardening: Hardening) => hardeningNames[hardening]

const kindNames: Record<MaterialKind, string> = {
  'ground': 'Ground or gesso', 'primer': 'Primer', 'paint': 'Paint', 'enamel': 'Enamel', 'varnish': 'Varnish', 'oil': 'Oil', 'lacquer': 'Lacquer', 'shellac': 'Shellac', 'resin': 'Resin', 'wax': 'Wax',
  'size': 'Size for leaf', 'glue size': 'Glue size', 'bole': 'Bole', 'medium': 'Medium', 'glue': 'Glue', 'paste': 'Paste',
}
export const oneKindText = (kind: MaterialKind) => kindNames[kind]

const thinners: Record<Solvent, string> = { 'none': 'Nothing', 'water': 'Water', 'mineral spirits': 'Mineral spirits', 'turpentine': 'Turpentine', 'alcohol': 'Alcohol', 'lacquer thinner': 'Lacquer thinner', 'aliphatic solvent': 'Another aliphatic solvent' }
export const thinnerText = (solvent: Solvent) => thinners[solvent]

const contentNames: Record<Content, string> = { 'drying oil': 'Drying oil or alkyd', 'epoxy': 'Epoxy', 'isocyanate': 'Isocyanate', 'other hardener': 'A hardener that is neither epoxy nor isocyanate', 'cyanoacrylate': 'Cyanoacrylate', 'ammonia': 'Ammonia', 'lime': 'Lime or casein', 'propellant': 'Propellant: it is a spray can' }
export const contentText = (content: Content) => contentNames[content]

/** Where a figure comes from, kept beside it. */
export const sheetSources = {
  typed: (name: string, as: string) => `data sheet of ${name}, “${as}”`,
  usual: (kind: string) => `not on the sheet: usual for ${kind}, with a wider band`,
  careful: (kind: string) => `not on the sheet: the most careful usual for ${kind}`,
  climate: 'not on the sheet: taken as usual, times with a wider band',
  own: 'the studio’s own figure',
  mixed: 'worked out from its parts',
  recovery: 'Scuff it lightly',
} as const
