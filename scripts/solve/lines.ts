import { BadField } from '../model/fields'

/** Numbers of one line, apart by blanks. */
export const numbersOf = (line: string): number[] => line.trim().split(/\s+/).filter(word => word !== '').map(Number)

/** A line of at least `least` whole numbers. @throws BadField naming the line. */
export function wholeNumbers(lines: readonly string[], index: number, least: number, what: string): number[] {
  const numbers = numbersOf(lines[index] ?? '')
  if (numbers.length < least || !numbers.every(Number.isInteger)) throw new BadField(`line ${index + 1}: expected ${what}, got ${JSON.stringify(lines[index] ?? '')}`)
  return numbers
}

/** Uses of the resources in a row of amounts. */
export const usesOf = (amounts: readonly number[]): Record<string, number> => Object.fromEntries(amounts.flatMap((amount, k) => (amount > 0 ? [[`r${k}`, amount] as const] : [])))

export const resourcesOf = (capacities: readonly number[]) => capacities.map((capacity, k) => ({ id: `r${k}`, capacity }))

/** Judged by when all is done, and nothing else. */
export const makespanOnly = { windowsMissed: 0, lateness: 0, setup: 0, waiting: 0, moves: 0, makespan: 1 }
