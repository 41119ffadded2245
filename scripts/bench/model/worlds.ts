import type { Milestone } from '#shared/drying/types'
import type { Chance } from './chance'

/** One studio's bench: how its next coat really behaves, as the log of true over sheet minutes per rung, and the middle of such coats. */
export interface Bench { coat(): Float64Array, middle(): Float64Array }

export interface World { name: string, says: string, tuned: boolean, bench(chance: Chance, ladder: readonly Milestone[]): Bench }

const bandZ = 1.2816

/** A standard score on the sheet's own two-piece normal: low..high is its 10-90 % band. */
function onSheet({ low, typical, high }: Milestone, score: number): number {
  return score * (score > 0 ? Math.log(high / typical) : Math.log(typical / low)) / bandZ
}

const row = (ladder: readonly Milestone[], score: (rung: number) => number) => Float64Array.from(ladder, (rung, k) => onSheet(rung, score(k)))

const offset: World = {
  name: 'offset', tuned: true,
  says: 'The sheet is wrong by a fixed factor on this bench: one score from its own band for good, and every coat off by 0.12 (log sd) more.',
  bench(chance, ladder) {
    const score = chance.normal()
    const middle = row(ladder, () => score)
    return {
      middle: () => middle,
      coat: () => {
        const own = 0.12 * chance.normal()
        return middle.map(x => x + own)
      },
    }
  },
}

const scatter: World = {
  name: 'scatter', tuned: true,
  says: 'The sheet is right on average and its band is what coats do: every coat has a score of its own.',
  bench(chance, ladder) {
    const middle = new Float64Array(ladder.length)
    return {
      middle: () => middle,
      coat: () => {
        const score = chance.normal()
        return row(ladder, () => score)
      },
    }
  },
}

const coatsPerTin = 6

/** Never tuned against: half the variance is the bench's, a fifth the tin's, the rest the coat's; rungs agree only in part; some coats are odd. */
const tins: World = {
  name: 'tins', tuned: false,
  says: 'Kept out of tuning. Of the sheet\'s variance half is the bench\'s, a fifth the tin\'s (a new one every 6 coats), the rest the coat\'s; rungs go together at 0.7; 3 coats in 100 are odd by 0.7 (log sd).',
  bench(chance, ladder) {
    const scores = (variance: number) => {
      const common = chance.normal()
      return ladder.map(() => Math.sqrt(variance) * (Math.sqrt(0.7) * common + Math.sqrt(0.3) * chance.normal()))
    }
    const bench = scores(0.5)
    let tin = scores(0.2)
    let coats = 0
    return {
      middle: () => row(ladder, k => bench[k]! + tin[k]!),
      coat: () => {
        if (coats++ % coatsPerTin === 0) tin = scores(0.2)
        const own = scores(0.3)
        const odd = chance.share() < 0.03 ? 0.7 * chance.normal() : 0
        return row(ladder, k => bench[k]! + tin[k]! + own[k]!).map(x => x + odd)
      },
    }
  },
}

export const worlds: readonly World[] = [offset, scatter, tins]
