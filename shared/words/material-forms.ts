import type { MilestoneName } from '#shared/terms'
import { span } from '#shared/time'
import { humidityText, temperatureText } from '#shared/units'
import type { Units } from '#shared/units'
import { milestoneText } from '#shared/words/steps'

export const sheetForm = {
  title: 'New material',
  intro: 'Type what the data sheet says and leave the rest empty. What is not on the sheet is filled with the usual of its kind, with more doubt. A time needs its unit: 30 min, 2-4 h, 7 d.',
  add: 'New material from a data sheet',
  addMix: 'New mix',
  what: 'What it is',
  name: 'Name',
  kind: 'Kind',
  hardening: 'How it hardens',
  solvent: 'Thinned with',
  unsaid: 'Not on the sheet',
  film: 'Coverage and film',
  climate: 'Its times are for',
  times: 'Times',
  limits: 'Pot life and limits',
  hazards: 'Hazards, from the safety data sheet',
  holds: 'It holds',
  gloves: 'Gloves until it is cured',
  level: 'It must lie level while wet',
  ownHazards: 'Other hazards, in your words',
  keep: 'Keep this material',
  wanted: 'Three answers are needed: its name, its kind and how it hardens.',
  reads: (text: string) => `Reads as ${text}`,
  meaning: 'What it would mean here',
  meaningWaits: 'Choose its kind and how it hardens: then its times in your usual air stand here.',
  unread: 'Some figures cannot be read yet. See the fields.',
  standIns: (count: number) => count === 1 ? 'One time is not on the sheet: the usual of its kind stands in, with more doubt.' : `${count} times are not on the sheet: the usual of its kind stands in, with more doubt.`,
  carries: 'It carries these cautions',
  copyOf: (name: string) => `${name}, ours`,
} as const

/** "Ready to recoat: likely 2 h 10 min, give it till 4 h." Minutes; null where no time can be promised. */
export function readyText({ name, likelyMin, giveTillMin }: { name: MilestoneName, likelyMin: number | null, giveTillMin: number | null }): string {
  const what = milestoneText(name)
  const said = `${what.charAt(0).toUpperCase()}${what.slice(1)}`
  if (likelyMin === null) return `${said}: no time can be given in this air.`
  return giveTillMin === null ? `${said}: likely ${span(likelyMin)}. Nothing can be promised in this air.` : `${said}: likely ${span(likelyMin)}, give it till ${span(giveTillMin)}.`
}

/** "A normal coat in your usual air, 19 °C and 50 %." */
export const usualAirText = ({ tempC, rh }: { tempC: number, rh: number }, units: Units) => `A normal coat in your usual air, ${temperatureText(tempC, units)} and ${humidityText(rh)}.`

export const editionForm = {
  title: (name: string) => `Figures of ${name}`,
  intro: 'What you save becomes a new edition. Coats that are on keep the figures they were put on with; coats from now on go by these.',
  low: 'Quickest',
  typical: 'Usual',
  high: 'Slowest',
  source: 'Where from',
  lowOf: (what: string) => `${what}, quickest`,
  typicalOf: (what: string) => `${what}, usual`,
  highOf: (what: string) => `${what}, slowest`,
  sourceOf: (what: string) => `${what}, where from`,
  addRung: 'Add a milestone',
  addFigure: 'Add a figure',
  windows: 'Recoat windows',
  window: (at: number) => `Window ${at}`,
  from: 'Opens after',
  to: 'Shuts after',
  recovery: 'When it was missed',
  recoveryMin: 'Minutes a piece for that',
  addWindow: 'Add a window',
  empty: 'Empty all three to take a figure out.',
  note: 'Why, for whoever reads it later',
  keep: 'Save as a new edition',
  takeTheirs: 'Look at the edition in use',
  conflictSays: 'Your figures are still here.',
  waiting: 'Fetching its figures',
} as const

export const editionList = {
  title: 'Editions',
  failed: 'The editions could not be fetched.',
  waiting: 'Fetching the editions',
  edition: (no: number) => `Edition ${no}`,
  inUse: 'in use',
  by: (who: string, when: string) => `${who}, ${when}`,
  back: (no: number) => `Go back to edition ${no}`,
  backAsk: (no: number) => `Go back to edition ${no}?`,
  backSays: 'Its figures are taken up again as a new edition. Nothing is lost; coats that are on keep theirs.',
  backAct: 'Go back',
} as const

export const materialActs = {
  makeOurs: 'Make it ours',
  change: 'Change its figures',
  parts: 'Change its parts',
  copy: 'Copy it under another name',
  rename: 'Rename or put away',
  renameTitle: (name: string) => `Rename ${name}`,
  newName: 'Its name',
  save: 'Save the name',
  putAway: 'Put it away',
  putAwaySays: 'It leaves the lists. What was put on with it keeps its record.',
  bringBack: 'Bring it back',
  away: 'It has been put away.',
  ours: 'ours',
  awayTitle: 'Put away',
  showAway: 'Show what was put away',
} as const
