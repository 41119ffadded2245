import { lookup } from 'node:dns'
import type { LookupFunction } from 'node:net'
import { request as requestHttp } from 'node:http'
import type { IncomingMessage } from 'node:http'
import { request as requestHttps } from 'node:https'
import webpush from 'web-push'
import type { SendOutcome } from '~~/server/reminders/types'
import { isAllowedAddress, refuseEndpoint } from './address'
import type { PushKeys } from './keys'
import { callWords } from '#shared/words/calls'

/** A browser's push address and its two keys, URL-safe base64. */
export interface PushTarget { endpoint: string, p256dh: string, auth: string }

/** All that travels: no piece, material or person is named beyond what the sentence itself says. */
export interface PushPayload { title: string, body: string, path: string, tag: string }

export interface PushOptions {
  /** The stable id: a push service keeps only the newest undelivered message of a topic. At most 32 URL-safe base64 characters. */
  topic: string
  /** Seconds for which the service keeps trying. */
  ttl: number
  urgency: 'low' | 'normal' | 'high'
}

export interface PushSettings { keys: PushKeys, subject: string, allowLoopback: boolean, timeoutMs?: number }

class RefusedAddress extends Error {}

/** Checks what a name resolves to in the very look-up that the connection uses, so that it cannot change in between. */
function guardedLookup(allowLoopback: boolean): LookupFunction {
  return (host, options, answer) => {
    lookup(host, { ...options, all: true }, (error, found) => {
      if (error) return answer(error, '', 0)
      const refused = found.find(entry => !isAllowedAddress(entry.address, allowLoopback))
      if (refused || !found[0]) return answer(new RefusedAddress(callWords.pushAddress.inside), '', 0)
      if (options.all) return answer(null, found)
      answer(null, found[0].address, found[0].family)
    })
  }
}

interface Sendable { endpoint: string, headers: Record<string, string>, body: Buffer }

function post({ endpoint, headers, body }: Sendable, settings: PushSettings): Promise<IncomingMessage> {
  const url = new URL(endpoint)
  const request = url.protocol === 'https:' ? requestHttps : requestHttp
  return new Promise((resolve, reject) => {
    const call = request(url, { method: 'POST', headers, lookup: guardedLookup(settings.allowLoopback), signal: AbortSignal.timeout(settings.timeoutMs ?? 10_000), agent: false }, (response) => {
      response.resume()
      response.on('error', reject)
      resolve(response)
    })
    call.on('error', reject)
    call.end(body)
  })
}

/** What the service's answer means. A redirect is not followed: it could lead anywhere. */
function outcomeOf(response: IncomingMessage): SendOutcome {
  const status = response.statusCode ?? 0
  if (status >= 200 && status < 300) return { kind: 'accepted' }
  if (status === 404 || status === 410) return { kind: 'gone', problem: callWords.delivery.browserGone }
  if (status === 429 || status >= 500) {
    const after = Number(response.headers['retry-after'])
    return { kind: 'unreachable', problem: callWords.delivery.pushAnswered(status), retryAfterMs: Number.isFinite(after) && after > 0 ? after * 1000 : null }
  }
  return { kind: 'failed', problem: callWords.delivery.pushAnswered(status) }
}

// These are known before a byte of the message has left; anything else may have arrived.
const neverLeft = new Set(['ENOTFOUND', 'EAI_AGAIN', 'ECONNREFUSED', 'EHOSTUNREACH', 'ENETUNREACH', 'ENETDOWN', 'EADDRNOTAVAIL'])

function problemOf(error: unknown): SendOutcome {
  if (error instanceof RefusedAddress) return { kind: 'failed', problem: error.message }
  const code = error instanceof Error && 'code' in error ? String(error.code) : ''
  if (neverLeft.has(code)) return { kind: 'unreachable', problem: callWords.delivery.pushUnreachable, retryAfterMs: null }
  return { kind: 'unresolved', problem: callWords.delivery.pushSilent }
}

/**
 * Encrypts one message (RFC 8291), signs it (RFC 8292) and hands it to the browser's push service (RFC 8030).
 * Never throws: what went wrong is in the outcome. `unresolved` means that the service may have taken it.
 */
export async function sendPush(target: PushTarget, payload: PushPayload, options: PushOptions, settings: PushSettings): Promise<SendOutcome> {
  const refused = refuseEndpoint(target.endpoint, settings.allowLoopback)
  if (refused) return { kind: 'failed', problem: refused }
  let details
  try {
    details = webpush.generateRequestDetails(
      { endpoint: target.endpoint, keys: { p256dh: target.p256dh, auth: target.auth } },
      JSON.stringify(payload),
      { TTL: options.ttl, urgency: options.urgency, topic: options.topic, contentEncoding: 'aes128gcm', vapidDetails: { subject: settings.subject, ...settings.keys } },
    )
  }
  catch {
    return { kind: 'failed', problem: callWords.delivery.pushKeysUnusable }
  }
  const headers = Object.fromEntries(Object.entries(details.headers).map(([name, value]) => [name, String(value)]))
  try {
    return outcomeOf(await post({ endpoint: details.endpoint, headers, body: details.body ?? Buffer.alloc(0) }, settings))
  }
  catch (error) {
    return problemOf(error)
  }
}
