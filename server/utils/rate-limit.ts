import { getRequestIP } from 'h3'
import type { H3Event } from 'h3'
import { tooMany } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'

/** Counts tries by key in a window that begins with the first; kept in memory, so a restart forgives. */
export class TryCounter {
  private readonly tries = new Map<string, { count: number, since: number }>()

  constructor(private readonly limit: number, private readonly windowMs: number) {}

  /** Counts one more try; whether it is still within the limit. */
  allow(key: string, now: number): boolean {
    this.prune(now)
    const seen = this.tries.get(key) ?? { count: 0, since: now }
    seen.count += 1
    this.tries.set(key, seen)
    return seen.count <= this.limit
  }

  forget(key: string): void {
    this.tries.delete(key)
  }

  private prune(now: number) {
    for (const [key, { since }] of this.tries) if (now - since >= this.windowMs) this.tries.delete(key)
  }
}

const fiveMinutes = 5 * 60 * 1000
// One account from one address, and one address over all accounts: a studio's people share an address.
const byAccount = new TryCounter(10, fiveMinutes)
const byAddress = new TryCounter(60, fiveMinutes)

// The socket's own address: a forwarded one can be made up by anybody.
const addressOf = (event: H3Event, door: string) => `${door} ${getRequestIP(event) ?? ''}`

/** Counts a try at a door such as "sign-in"; the refusal when there were too many. */
export function limitTries(event: H3Event, door: string, account: string, now: number): Refusal | null {
  const address = addressOf(event, door)
  const allowed = [byAddress.allow(address, now), byAccount.allow(`${address} ${account}`, now)]
  return allowed.every(Boolean) ? null : tooMany()
}

/** Wipes the account's tries after one that succeeded. */
export function forgiveTries(event: H3Event, door: string, account: string): void {
  byAccount.forget(`${addressOf(event, door)} ${account}`)
}
