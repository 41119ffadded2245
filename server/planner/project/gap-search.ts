import { failed, GapSerial } from './gap-serial'
import { apart, mirroredNetwork } from './network'
import type { Found, SearchLimits } from './order-search'
import type { Arcs, Project } from './project'
import type { Network } from './network'
import { vary } from './vary'
import type { Member } from './vary'

const population = 12
const patience = 60

/** Arcs that order two activities strictly: a wait forward, or none forward and none back. */
function strictArcs({ size, gap }: Network, { at, other }: Arcs): Arcs {
  const result = { at: new Int32Array(size + 1), other: [] as number[], gap: [] as number[] }
  for (let to = 0; to < size; to++) {
    for (let k = at[to]!; k < at[to + 1]!; k++) {
      const from = other[k]!
      const least = gap[from * size + to]!
      if (least > 0 || (least === 0 && gap[to * size + from]! < 0)) {
        result.other.push(from)
        result.gap.push(least)
      }
    }
    result.at[to + 1] = result.other.length
  }
  return { at: result.at, other: Int32Array.from(result.other), gap: Int32Array.from(result.gap) }
}

/** Least starts over all paths. */
function firstStarts({ size, gap }: Network, release: Int32Array): Int32Array {
  return release.map((own, k) => {
    let most = own
    for (let i = 0; i < size; i++) if (gap[i * size + k] !== apart) most = Math.max(most, release[i]! + gap[i * size + k]!)
    return most
  })
}

/** From the start of each to the end of all, over all paths. */
function tailsOf({ size, minutes, gap }: Network): Int32Array {
  return minutes.map((own, k) => {
    let most = own
    for (let j = 0; j < size; j++) if (gap[k * size + j] !== apart) most = Math.max(most, gap[k * size + j]! + minutes[j]!)
    return most
  })
}

class GapSearch {
  private readonly forward: GapSerial
  private readonly backward: GapSerial
  private readonly first: Int32Array
  private readonly tails: Int32Array
  private readonly ends: Int32Array
  private readonly keys: Float64Array
  private readonly mirror: Int32Array
  private readonly trial: Int32Array
  private readonly members: Member[] = []
  private best: Member
  private schedules = 0
  private idle = 0

  constructor(private readonly project: Project, network: Network, private readonly limits: SearchLimits) {
    const { size } = project
    const turned = mirroredNetwork(network)
    this.first = firstStarts(network, project.release)
    this.tails = tailsOf(network)
    this.forward = new GapSerial(project, network, this.first, strictArcs(network, project.into))
    this.backward = new GapSerial(project, turned, this.tails.map((tail, k) => tail - project.minutes[k]!), strictArcs(turned, project.outOf))
    this.ends = new Int32Array(size)
    this.keys = new Float64Array(size)
    this.mirror = new Int32Array(size)
    this.trial = new Int32Array(size)
    this.best = { starts: new Int32Array(size), makespan: Infinity }
  }

  run(): Found | null {
    for (let k = 0; !this.done() && this.members.length < population && (k < 20 * population || this.members.length === 0); k++) this.seed(k)
    while (!this.done() && this.members.length > 0) this.step()
    return this.best.makespan === Infinity ? null : { ...this.best, schedules: this.schedules }
  }

  private done(): boolean {
    return this.best.makespan <= this.limits.bound || this.schedules >= this.limits.schedules || this.limits.shouldStop()
  }

  private endsBy(end: number): Int32Array {
    for (let i = 0; i < this.ends.length; i++) this.ends[i] = end - this.tails[i]!
    return this.ends
  }

  private place(end: number): number {
    this.schedules++
    return this.forward.decode(this.keys, this.trial, this.endsBy(end))
  }

  /** From the end back, in the order of when what `keys` begin with ends; then forward again. `failed` when no later than `end` cannot be had. */
  private justify(span: number, end: number): number {
    const { size, minutes } = this.project
    for (let i = 0; i < size; i++) {
      this.keys[i] = -(this.keys[i]! + minutes[i]!)
      this.ends[i] = span - this.first[i]! - minutes[i]!
    }
    this.schedules++
    const turned = this.backward.decode(this.keys, this.mirror, this.ends)
    if (turned === failed) return failed
    for (let i = 0; i < size; i++) this.keys[i] = -this.mirror[i]! - minutes[i]!
    return this.place(end)
  }

  private seed(k: number): void {
    const { random } = this.limits
    const spread = k === 0 ? 0 : 0.05 + 0.4 * random()
    const span = this.tails.reduce((most, value) => Math.max(most, value), 1)
    const rule = k % 3
    for (let i = 0; i < this.keys.length; i++) {
      this.keys[i] = (rule === 1 ? this.first[i]! : rule === 2 ? (this.first[i]! - this.tails[i]!) / 2 : -this.tails[i]!) + (random() - 0.5) * spread * span
    }
    let makespan = this.place(this.project.horizon)
    if (makespan === failed) return
    const starts = this.trial.slice()
    this.keys.set(starts)
    const better = this.justify(makespan, makespan)
    if (better !== failed) [makespan] = [better, starts.set(this.trial)]
    this.members.push(this.kept({ starts, makespan }))
  }

  private kept(member: Member): Member {
    if (member.makespan < this.best.makespan) {
      this.best = { starts: member.starts.slice(), makespan: member.makespan }
      this.idle = 0
    }
    return member
  }

  private step(): void {
    const { random } = this.limits
    if (++this.idle > patience * population) return this.restart()
    const parent = this.members[Math.floor(random() * this.members.length)]!
    const second = this.members[Math.floor(random() * this.members.length)]!
    vary(parent, second, this.project.minutes, this.keys, random)
    const makespan = random() < 0.5 ? this.justify(Math.ceil(parent.makespan * 1.2), parent.makespan) : this.place(parent.makespan)
    if (makespan === failed || makespan > parent.makespan) return
    parent.starts.set(this.trial)
    parent.makespan = makespan
    this.kept(parent)
  }

  private restart(): void {
    this.idle = 0
    this.members.sort((a, b) => a.makespan - b.makespan)
    this.members.length = this.limits.random() < 0.5 ? Math.ceil(this.members.length / 2) : 0
    for (let k = 0; !this.done() && this.members.length < population && k < 10 * population; k++) this.seed(k)
    if (this.members.length === 0) this.members.push({ starts: this.best.starts.slice(), makespan: this.best.makespan })
  }
}

/** Searches the orders of a project with longest waits; null when no plan was found. `network` is settled. */
export const searchGaps = (project: Project, network: Network, limits: SearchLimits): Found | null => new GapSearch(project, network, limits).run()
