import { Serial } from './serial'
import type { Project } from './project'
import { vary } from './vary'
import type { Member } from './vary'

export interface SearchLimits { random: () => number, schedules: number, shouldStop: () => boolean, bound: number }
export interface Found { starts: Int32Array, makespan: number, schedules: number }

/**
 * How many plans are kept side by side: more when there is longer to better them, since few grow alike before the time is up. The square
 * root was found with 5,000, 50,000 and 300,000 schedules; without a number, as many as suit seconds.
 */
const populationFor = (schedules: number) => Math.max(4, Math.min(40, Math.round(Math.sqrt(schedules) / 9)))

/** Restart with the better half kept after so many children for each member and activity without a gain. */
const patience = 3

/** Share of the children that may take their parent's place though they end a minute later: a plateau is left by its edge. */
const lenient = 0.03

class OrderSearch {
  private readonly serial: Serial
  private readonly keys: Float64Array
  private readonly trial: Int32Array
  private members: Member[] = []
  private best: Member
  private idle = 0
  private readonly population: number

  constructor(private readonly project: Project, private readonly limits: SearchLimits) {
    this.serial = new Serial(project)
    this.population = populationFor(limits.schedules)
    this.keys = new Float64Array(project.size)
    this.trial = new Int32Array(project.size)
    this.best = { starts: new Int32Array(project.size), makespan: Infinity }
  }

  run(): Found {
    const tails = latestStarts(this.project)
    this.seed(0, tails)
    for (let k = 1; k < this.population && !this.done(); k++) this.seed(k, tails)
    while (!this.done()) this.step(tails)
    return { ...this.best, schedules: this.serial.schedules }
  }

  private done(): boolean {
    return this.best.makespan <= this.limits.bound || this.serial.schedules >= this.limits.schedules || this.limits.shouldStop()
  }

  private seed(k: number, tails: Int32Array): void {
    const { random } = this.limits
    const spread = k === 0 ? 0 : 0.1 + 0.25 * random()
    const span = tails.reduce((most, value) => Math.max(most, value), 1)
    for (let i = 0; i < this.keys.length; i++) this.keys[i] = tails[i]! + (random() - 0.5) * spread * span
    this.serial.decode(this.keys, this.trial)
    for (let i = 0; i < this.keys.length; i++) this.keys[i] = this.trial[i]!
    const makespan = this.serial.justify(this.keys, this.trial)
    this.members[k] = this.kept({ starts: this.trial.slice(), makespan })
  }

  private kept(member: Member): Member {
    if (member.makespan < this.best.makespan) {
      this.best = { starts: member.starts.slice(), makespan: member.makespan }
      this.idle = 0
    }
    return member
  }

  private step(tails: Int32Array): void {
    const { random } = this.limits
    if (++this.idle > patience * this.project.size * this.population) return this.restart(tails)
    const parent = this.members[Math.floor(random() * this.members.length)]!
    const second = this.members[Math.floor(random() * this.members.length)]!
    vary(parent, second, this.project.minutes, this.keys, random)
    const makespan = this.serial.justify(this.keys, this.trial)
    if (makespan > parent.makespan + (random() < lenient ? 1 : 0)) return
    parent.starts.set(this.trial)
    parent.makespan = makespan
    this.kept(parent)
  }

  private restart(tails: Int32Array): void {
    this.idle = 0
    this.members.sort((a, b) => a.makespan - b.makespan)
    const keep = this.limits.random() < 0.5 ? Math.ceil(this.population / 2) : 0
    for (let k = keep; k < this.population && !this.done(); k++) this.seed(k, tails)
  }
}

/** Latest starts by the arcs alone, shifted to begin at 0: the first order to try. */
function latestStarts(project: Project): Int32Array {
  const tail = new Int32Array(project.size)
  const { at, other, gap } = project.outOf
  for (let grew = true; grew;) {
    grew = false
    for (let i = project.size - 1; i >= 0; i--) {
      let most = project.minutes[i]!
      for (let k = at[i]!; k < at[i + 1]!; k++) most = Math.max(most, gap[k]! + tail[other[k]!]!)
      if (most > tail[i]!) [tail[i], grew] = [most, true]
    }
  }
  const span = tail.reduce((most, value) => Math.max(most, value), 0)
  return tail.map(value => span - value)
}

/** Searches the orders of a plain project: stretches of time shaken, stretches of two plans crossed, every child improved backward and forward. */
export const searchOrders = (project: Project, limits: SearchLimits): Found => new OrderSearch(project, limits).run()
