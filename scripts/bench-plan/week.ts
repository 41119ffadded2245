import { chanceFrom } from '../bench/chance'

type Chance = () => number

const between = (chance: Chance, low: number, high: number, step: number) => low + step * Math.floor(chance() * ((high - low) / step + 1))

interface Step { id: string, kind: 'coat' | 'sand' | 'clamp' | 'bench', minutes: number }

const usesOf: Readonly<Record<Step['kind'], Record<string, number>>> = { coat: { hands: 1, booth: 1 }, sand: { hands: 1, bench: 1 }, clamp: { hands: 1, bench: 1 }, bench: { hands: 1, bench: 1 } }

/** Nine to five with a break, so many weekdays from day 0. */
const hours = (days: number) => Array.from({ length: days }, (_, day) => day).filter(day => day % 7 < 5)
  .flatMap(day => [[day * 1440 + 540, day * 1440 + 750], [day * 1440 + 780, day * 1440 + 1020]])

/**
 * A week of an invented studio in the exchanged form: jobs of three to six steps, films and glue that rest on shelves or in clamps, windows,
 * dust to keep from wet film, releases, due dates and weights. The same seed gives the same week.
 */
export function studioWeek(seed: number, jobs: number): object {
  const chance = chanceFrom(seed)
  const kinds: Step['kind'][] = ['coat', 'sand', 'clamp', 'bench']
  const works = Array.from({ length: jobs }, (_, j) => Array.from({ length: between(chance, 3, 6, 1) }, (_step, s): Step => {
    const kind = kinds[Math.floor(chance() * kinds.length)]!
    return { id: `J${j}.${s}${kind}`, kind, minutes: between(chance, 10, 60, 5) }
  }))
  const links = works.flatMap(steps => steps.slice(1).map((to, i) => ({ from: steps[i]!, to })))
  const lags = links.map(({ from, to }) => {
    const wait = from.kind === 'coat' ? between(chance, 60, 900, 15) : from.kind === 'clamp' ? between(chance, 45, 240, 15) : 0
    return { from: from.id, to: to.id, min: wait, max: from.kind === 'coat' && chance() < 0.5 ? wait + between(chance, 240, 1800, 60) : null }
  })
  const rests = links.filter(({ from }) => from.kind === 'coat' || from.kind === 'clamp').map(({ from, to }) => ({ from: from.id, to: to.id, uses: from.kind === 'coat' ? { shelf: 1 } : { clamps: 1 } }))
  const all = works.flat()
  const still = all.filter(step => step.kind === 'sand' && chance() < 0.5).flatMap(dusty => all.filter(film => film.kind === 'coat' && film.id.split('.')[0] !== dusty.id.split('.')[0])
    .map(film => ({ dusty: dusty.id, film: film.id, room: 'shop', dustFree: 30 })))
  return {
    activities: all.map(({ id, kind, minutes }) => ({ id, minutes, uses: usesOf[kind] })),
    resources: [{ id: 'hands', capacity: 1 + Math.floor(chance() * 2), open: hours(28) }, { id: 'shelf', capacity: 3, open: null }, { id: 'clamps', capacity: 2, open: null }, { id: 'booth', capacity: 1, open: null }, { id: 'bench', capacity: 1, open: null }],
    lags, rests, still,
    jobs: works.map((steps, j) => ({ id: `J${j}`, activities: steps.map(step => step.id), release: between(chance, 0, 1440, 60), due: between(chance, 1440, 5760, 60), weight: between(chance, 1, 5, 1) })),
    horizon: 28 * 1440,
  }
}
