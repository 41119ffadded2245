import { noticeFor, pathAfter, readPush } from './notification'

/** Shows what is pushed and opens its page at a press. */
export function listenForPush(scope: ServiceWorkerGlobalScope) {
  scope.addEventListener('push', (event) => {
    const { title, options } = noticeFor(readPush(event.data?.text() ?? null))
    event.waitUntil(scope.registration.showNotification(title, options))
  })
  scope.addEventListener('notificationclick', (event) => {
    event.notification.close()
    event.waitUntil(openPage(scope, pathAfter(event.notification.data, event.action)))
  })
  scope.addEventListener('pushsubscriptionchange', (event) => {
    // TypeScript's worker types know the event without its two subscriptions (Push API, section 10.4).
    const change = event as ExtendableEvent & { oldSubscription?: PushSubscription | null, newSubscription?: PushSubscription | null }
    change.waitUntil(renew(scope, change.oldSubscription ?? null, change.newSubscription ?? null))
  })
}

async function openPage(scope: ServiceWorkerGlobalScope, path: string) {
  const address = new URL(path, scope.location.origin).href
  const pages = await scope.clients.matchAll({ type: 'window', includeUncontrolled: true })
  const page = pages.find(one => one.url === address) ?? pages[0]
  if (!page) return void await scope.clients.openWindow(address)
  const there = page.url === address ? page : await page.navigate(address).catch(() => null)
  await (there ?? page).focus()
}

/** A browser may change its own subscription; without this it would fall silent. */
async function renew(scope: ServiceWorkerGlobalScope, before: PushSubscription | null, after: PushSubscription | null) {
  const made = after ?? (before && await scope.registration.pushManager.subscribe(before.options))
  if (made) await fetch('/api/push/subscriptions', { method: 'POST', headers: { 'content-type': 'application/json' }, body: JSON.stringify(made.toJSON()) })
}
