import { leavesFilm, sands } from '#shared/step-kinds'
import type { CautionKey } from '#shared/library/cautions'
import type { StepKind } from '#shared/terms'

/**
 * The cautions that must be read at arm's length from a tag, or across a room from the wall, in a few words; the gravest first. What is not here has
 * only its full text: a few words would make it milder than it is.
 */
const brief = {
  'ask first': 'Harms unseen: ask first',
  'isocyanate': 'Asthma for life: ask first',
  'old paint': 'Lead? No sanding, no heat',
  'green cloth': 'Arsenic? No sanding, no cutting',
  'metal coating': 'Metal coat: no sanding, no heat',
  'mould': 'Mould: bag it, no brushing',
  'oily rags': 'Rags burn: flat outdoors or in the water can',
  'flames': 'No flames, no sparks',
  'phones': 'No phones in the spray room',
  'vapour': 'Exhaust on',
  'sleeping room': 'Not where anybody sleeps',
  'epoxy skin': 'No bare skin',
  'gloves': 'Gloves till cured',
  'part-cured dust': 'No sanding till cured',
  'cyanoacrylate': 'Fume stings; no cotton',
  'sanding dust': 'Catch the dust, mask on',
} as const satisfies Partial<Record<CautionKey, string>>

/** The last words of every brief line: what it defers to. */
export const briefDeferral = 'Read the data sheet'

/** The cautions to be read in few words where a step is done: those of what it puts on, and those of its dust. */
export function stepCautions(kind: StepKind, ofMaterial: readonly string[]): string[] {
  const keys = sands(kind) ? ['sanding dust'] : leavesFilm(kind) ? ofMaterial.filter(key => key !== 'sanding dust') : []
  return Object.keys(brief).filter(key => keys.includes(key))
}

/** The brief lines of some cautions, each once, the gravest first. */
export function briefCautions(keys: readonly string[]): string[] {
  return (Object.keys(brief) as (keyof typeof brief)[]).filter(key => keys.includes(key)).map(key => brief[key])
}

/**
 * One line for a tag: as many of the gravest cautions as `room` letters hold, how many more there are, and what it defers to. Never empty: a tag
 * without a caution of its own still names the data sheet. The gravest is never cut. @param room letters, 40 or more
 */
export function tagCaution(keys: readonly string[], room = 100): string {
  const lines = briefCautions(keys)
  for (let shown = lines.length; shown > 1; shown--) {
    const line = tagLine(lines, shown)
    if (line.length <= room) return line
  }
  return tagLine(lines, 1)
}

const tagLine = (lines: readonly string[], shown: number) => [...lines.slice(0, shown), ...lines.length > shown ? [`${lines.length - shown} more`] : [], briefDeferral].map(each => `${each}.`).join(' ')
