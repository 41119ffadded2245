import type { Content } from '#shared/library/required-cautions'
import type { LibraryMaterial, MaterialKind, Solvent } from '#shared/library/types'
import type { Driver, MilestoneName } from '#shared/terms'

/** How a material dries or hardens, as a person reads it off a sheet: one answer gives every rung its driver and names what it holds. */
export const hardenings = ['water', 'solvent', 'oil', 'epoxy', 'isocyanate', 'two parts', 'moisture', 'instant', 'cooling'] as const
export type Hardening = typeof hardenings[number]

interface HardeningFacts {
  /** What it is thinned with unless somebody says otherwise; null: it must be said, or counts as the strongest. */
  solvent: Solvent | null
  contents: readonly Content[]
}

export const hardeningFacts: Record<Hardening, HardeningFacts> = {
  'water': { solvent: 'water', contents: [] },
  'solvent': { solvent: null, contents: [] },
  'oil': { solvent: null, contents: ['drying oil'] },
  'epoxy': { solvent: 'none', contents: ['epoxy'] },
  'isocyanate': { solvent: null, contents: ['isocyanate'] },
  'two parts': { solvent: null, contents: ['epoxy', 'isocyanate'] },
  'moisture': { solvent: 'none', contents: ['isocyanate'] },
  'instant': { solvent: 'none', contents: ['cyanoacrylate'] },
  'cooling': { solvent: 'water', contents: [] },
}

/** A thinner that nobody named counts as the one that asks for most care. */
export const strongestSolvent: Solvent = 'lacquer thinner'

/** Whether what a material of this kind leaves lies between parts. */
export const filmOf = (kind: MaterialKind): 'open' | 'joint' => kind === 'glue' || kind === 'paste' ? 'joint' : 'open'

const late: readonly MilestoneName[] = ['dry-to-sand-flat', 'full-strength', 'cured']

/** What carries a film to a milestone (model of drivers, section 2 of docs/model.md): the first rungs of an oil are its thinner leaving. */
export function driverOf(hardening: Hardening, film: 'open' | 'joint', solvent: string, name: MilestoneName): Driver {
  switch (hardening) {
    case 'water': return film === 'joint' ? (name === 'at-tack' ? 'water' : 'joint') : late.includes(name) ? 'coalescence' : 'water'
    case 'solvent': return 'solvent'
    case 'oil': return name === 'set-to-touch' && solvent !== 'none' && solvent !== 'water' ? 'solvent' : 'oxidation'
    case 'epoxy':
    case 'isocyanate':
    case 'two parts': return 'reaction'
    case 'moisture':
    case 'instant': return 'moisture'
    case 'cooling': return name === 'set-to-touch' ? 'gel' : film === 'joint' ? 'joint' : solvent === 'water' ? 'water' : 'gel'
  }
}

/** How a material of the starter library hardens, by the drivers of its ladder and what it holds. */
export function hardeningOf(material: Pick<LibraryMaterial, 'milestones' | 'isocyanate' | 'cautions'>): Hardening {
  const drivers = material.milestones.map(rung => rung.driver)
  if (drivers.includes('oxidation')) return 'oil'
  if (drivers.includes('reaction')) return material.isocyanate ? 'isocyanate' : 'epoxy'
  if (drivers.includes('moisture')) return material.isocyanate ? 'moisture' : 'instant'
  if (drivers.includes('gel')) return 'cooling'
  return drivers.every(driver => driver === 'solvent') || drivers[0] === 'solvent' ? 'solvent' : 'water'
}
