import type { CautionKey } from '#shared/library/cautions'
import type { Driver } from '#shared/terms'

/** What a material holds, as its data sheet declares it, that asks for cautions of its own. */
export const contents = ['drying oil', 'epoxy', 'isocyanate', 'other hardener', 'cyanoacrylate', 'ammonia', 'lime', 'propellant'] as const
export type Content = typeof contents[number]

const ofContent: Record<Content, readonly CautionKey[]> = {
  'drying oil': ['oily rags', 'waste can', 'sleeping room', 'airing'],
  'epoxy': ['epoxy skin', 'part-cured dust', 'gloves'],
  'isocyanate': ['isocyanate', 'gloves'],
  'other hardener': ['gloves'],
  'cyanoacrylate': ['cyanoacrylate'],
  'ammonia': ['ammonia'],
  'lime': ['casein lime'],
  'propellant': ['aerosol', 'flames'],
}

/** The one caution by which a content is known again in what an edition carries. */
const markOf: Partial<Record<Content, CautionKey>> = { epoxy: 'epoxy skin', cyanoacrylate: 'cyanoacrylate', ammonia: 'ammonia', lime: 'casein lime', propellant: 'aerosol' }

export const ofSolvent: readonly CautionKey[] = ['vapour', 'flames', 'fan', 'dust mask', 'sleeping room', 'children', 'symptoms', 'waste can']

interface Declared { solvent: string, contents: readonly Content[], gloves: boolean }

/** The cautions that nothing with this thinner and these contents may be without, each once. A thinner that is not known by name counts as a solvent. */
export function requiredCautions({ solvent, contents: held, gloves }: Declared): CautionKey[] {
  const found: CautionKey[] = []
  if (solvent !== 'water' && solvent !== 'none') found.push(...ofSolvent)
  if (solvent === 'alcohol' || solvent === 'lacquer thinner') found.push('pouring')
  for (const content of contents) if (held.includes(content)) found.push(...ofContent[content])
  if (gloves) found.push('gloves')
  return [...new Set(found)]
}

/**
 * What a material must be taken to hold by the way it hardens, beyond what was declared: what takes in air is an oil; a hardener that nobody named
 * may be either of the harmful ones; what cures with water from the air is an isocyanate unless it is the instant glue.
 */
export function impliedContents(drivers: readonly Driver[], declared: readonly Content[]): Content[] {
  const found = new Set(declared)
  const has = (...some: Content[]) => some.some(each => found.has(each))
  if (drivers.includes('oxidation')) found.add('drying oil')
  if (drivers.includes('reaction') && !has('epoxy', 'isocyanate', 'other hardener')) found.add('epoxy').add('isocyanate')
  if (drivers.includes('moisture') && !has('isocyanate', 'cyanoacrylate')) found.add('isocyanate')
  return contents.filter(each => found.has(each))
}

/** Whether half-cured film of it harms the skin. */
export const needsGloves = (held: readonly Content[]) => held.some(each => each === 'epoxy' || each === 'isocyanate' || each === 'other hardener')

/** What an edition was declared to hold, read from what it carries. */
export function contentsOf(edition: { dryingOil: boolean, isocyanate: boolean, cautions: readonly string[], rungs: readonly { driver: Driver }[] }): Content[] {
  const marked = contents.filter((content) => {
    const mark = markOf[content]
    return mark !== undefined && edition.cautions.includes(mark)
  })
  const found: Content[] = [...marked, ...edition.dryingOil ? ['drying oil' as const] : [], ...edition.isocyanate ? ['isocyanate' as const] : []]
  const hardened = edition.rungs.some(rung => rung.driver === 'reaction')
  if (hardened && !found.includes('epoxy') && !found.includes('isocyanate')) found.push('other hardener')
  return contents.filter(each => found.includes(each))
}
