import type { Seat } from './seat'

/**
 * Starts that some nodes of a unit are not to begin before: orders alone cannot say "start later, so that the next coat falls in hours
 * and leaves the shelf to another". Where it was, the next opening of its hands, or when another piece's work ends.
 */
export class Floors {
  readonly at: Int32Array

  constructor(size: number, private readonly random: () => number) {
    this.at = new Int32Array(size)
  }

  /** Draws floors for a unit; null for none. */
  draw(seat: Seat, others: readonly Seat[]): Int32Array | null {
    const { random } = this
    const kind = random()
    if (kind < 0.3) return null
    const { nodes } = seat.unit
    const cut = kind < 0.6 ? Math.floor(random() * nodes.length) : -1
    const share = 1 / nodes.length + random() * 0.5
    for (let node = 0; node < nodes.length; node++) {
      const { members, starts } = nodes[node]!
      let least = 0
      if (cut >= 0) least = node < cut ? seat.start(node) : node === cut ? this.moment(seat, node, others) : 0
      else if (random() < share) least = this.moment(seat, node, others)
      for (let i = 0; i < members.length; i++) this.at[members[i]!] = least + starts[i]!
    }
    return this.at
  }

  private moment(seat: Seat, node: number, others: readonly Seat[]): number {
    const { random } = this
    const kind = random()
    const was = seat.start(node)
    if (kind < 0.3) return was
    if (kind < 0.6) return this.opening(seat, node, was)
    const other = others[Math.floor(random() * others.length)]!
    const k = Math.floor(random() * other.unit.nodes.length)
    return random() < 0.5 ? other.end(k) + seat.unit.nodes[node]!.setup : other.start(k) + (random() < 0.5 ? 0 : -seat.unit.nodes[node]!.length)
  }

  /** One of the openings about a moment. */
  private opening(seat: Seat, node: number, minute: number): number {
    const { modes, setup } = seat.unit.nodes[node]!
    const { open } = modes[Math.floor(this.random() * modes.length)]!
    let i = 0
    while (i + 2 < open.length && open[i + 2]! <= minute) i += 2
    const picked = Math.max(0, Math.min(open.length - 2, i + 2 * (Math.floor(this.random() * 3) - 1)))
    return (open[picked] ?? minute) + setup
  }
}
