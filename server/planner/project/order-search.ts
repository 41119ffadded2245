import { Serial } from './serial'
import type { Project } from './project'

export interface SearchLimits { random: () => number, schedules: number, shouldStop: () => boolean, bound: number }
export interface Found { starts: Int32Array, makespan: number, schedules: number }

interface Member { starts: Int32Array, makespan: number }

/** How many plans are kept side by side: fewer when there is little time to better them. */
const populationFor = (schedules: number) => (schedules <= 10_000 ? 8 : 16)

/** Restart with the better half kept after so many children for each member without a gain. */
const patience = 60

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
    if (++this.idle > patience * this.population) return this.restart(tails)
    const parent = this.members[Math.floor(random() * this.members.length)]!
    const second = this.members[Math.floor(random() * this.members.length)]!
    if (random() < 0.7 || parent === second) this.shake(parent)
    else this.cross(parent, second)
    const makespan = this.serial.justify(this.keys, this.trial)
    const replaced = makespan <= parent.makespan ? parent : null
    if (!replaced) return
    replaced.starts.set(this.trial)
    replaced.makespan = makespan
    this.kept(replaced)
  }

  /** The order inside a stretch of time is shaken. */
  private shake({ starts, makespan }: Member): void {
    const { random } = this.limits
    const width = makespan * (0.06 + 0.39 * random())
    const from = random() * (makespan + width) - width
    for (let i = 0; i < starts.length; i++) {
      const middle = starts[i]! + this.project.minutes[i]! / 2
      this.keys[i] = middle >= from && middle < from + width ? starts[i]! + (random() - 0.5) * width : starts[i]!
    }
  }

  /** Of one parent a stretch of time, of the other the rest. */
  private cross(one: Member, other: Member): void {
    const { random } = this.limits
    const width = one.makespan * (0.2 + 0.4 * random())
    const from = random() * (one.makespan - width)
    for (let i = 0; i < one.starts.length; i++) {
      const start = one.starts[i]!
      this.keys[i] = start >= from && start < from + width ? start : other.starts[i]!
    }
  }

  private restart(tails: Int32Array): void {
    this.idle = 0
    this.members.sort((a, b) => a.makespan - b.makespan)
    const keep = this.limits.random() < 0.5 ? this.population / 2 : 0
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
