import { chanceFrom } from '../chance'

/** A seeded source of chance: shares 0..1 and standard normals. */
export interface Chance { share(): number, normal(): number, between(low: number, high: number): number }

/** Normals by the polar-free Box-Muller form; one number from two shares, so that a stream stays easy to follow. */
export function chanceOf(seed: number): Chance {
  const share = chanceFrom(seed)
  return {
    share,
    normal: () => Math.sqrt(-2 * Math.log(1 - share())) * Math.cos(2 * Math.PI * share()),
    between: (low, high) => low + (high - low) * share(),
  }
}
