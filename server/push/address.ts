import { BlockList, isIP } from 'node:net'
import { callWords } from '#shared/words/calls'

// A subscription's address comes from a browser, so anybody who can sign in could point the server at the studio's own network.
const inside = new BlockList()
const insideV4: [string, number][] = [
  ['0.0.0.0', 8], ['10.0.0.0', 8], ['100.64.0.0', 10], ['127.0.0.0', 8], ['169.254.0.0', 16], ['172.16.0.0', 12], ['192.0.0.0', 24],
  ['192.0.2.0', 24], ['192.88.99.0', 24], ['192.168.0.0', 16], ['198.18.0.0', 15], ['198.51.100.0', 24], ['203.0.113.0', 24], ['224.0.0.0', 4], ['240.0.0.0', 4],
]
const insideV6: [string, number][] = [
  ['::', 96], ['64:ff9b::', 96], ['64:ff9b:1::', 48], ['100::', 64], ['2001::', 23], ['2001:db8::', 32], ['2002::', 16], ['fc00::', 7], ['fe80::', 10], ['fec0::', 10], ['ff00::', 8],
]
for (const [net, bits] of insideV4) inside.addSubnet(net, bits, 'ipv4')
for (const [net, bits] of insideV6) inside.addSubnet(net, bits, 'ipv6')

const loopback = new BlockList()
loopback.addSubnet('127.0.0.0', 8, 'ipv4')
loopback.addAddress('::1', 'ipv6')

const bare = (host: string) => host.replace(/^\[|\]$/g, '')
const within = (list: BlockList, address: string) => list.check(address, isIP(address) === 6 ? 'ipv6' : 'ipv4')

/** Whether an IP address (v4 or v6, mapped forms too) is this machine. Anything that is not an address is not. */
export function isLoopback(address: string): boolean {
  return isIP(bare(address)) !== 0 && within(loopback, bare(address))
}

/** Whether a push may go to this IP address: public, or this machine when the test switch is on. */
export function isAllowedAddress(address: string, allowLoopback: boolean): boolean {
  const host = bare(address)
  if (isIP(host) === 0) return false
  if (allowLoopback && isLoopback(host)) return true
  return !within(inside, host)
}

/**
 * Says what is wrong with a subscription's endpoint before any name is looked up, or null.
 * What the name resolves to is checked again when the connection is made.
 */
export function refuseEndpoint(endpoint: string, allowLoopback: boolean): string | null {
  if (!URL.canParse(endpoint)) return callWords.pushAddress.unreadable
  const url = new URL(endpoint)
  const host = bare(url.hostname)
  const here = allowLoopback && (isLoopback(host) || host === 'localhost')
  if (url.protocol !== 'https:' && !(here && url.protocol === 'http:')) return callWords.pushAddress.notHttps
  if (url.username || url.password) return callWords.pushAddress.credentials
  if (here) return null
  if (host === 'localhost' || host.endsWith('.localhost')) return callWords.pushAddress.inside
  if (isIP(host) && !isAllowedAddress(host, allowLoopback)) return callWords.pushAddress.inside
  return null
}
