import type { CautionWire } from '#shared/schemas/schedule'
import { speaksInWords } from '#shared/vapour/facts'

/** The cautions of some materials, each once with the materials it speaks of, in the order first met. */
export function cautionsOf(materials: readonly { name: string, cautions: readonly string[] }[]): CautionWire[] {
  const named = new Map<string, Set<string>>()
  for (const { name, cautions } of materials) {
    for (const key of cautions) named.set(key, (named.get(key) ?? new Set()).add(name))
  }
  return [...named].map(([key, names]) => ({ key, materials: [...names] }))
}

/** A material's cautions, and first whom to ask where its vapour is spoken of in words only. */
export function cautionsWith({ cautions, solvent, solventKey }: { cautions: readonly string[], solvent: string | null, solventKey: string | null }): string[] {
  return [...speaksInWords(solvent, solventKey) ? ['ask first'] : [], ...cautions]
}
