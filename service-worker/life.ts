/** A new worker replaces the old one at once: it keeps no pages (the one for a studio out of reach it makes itself), so nothing can be mixed up. */
export function takeOver(scope: ServiceWorkerGlobalScope) {
  scope.addEventListener('install', (event) => {
    event.waitUntil(scope.skipWaiting())
  })
  scope.addEventListener('activate', (event) => {
    event.waitUntil(scope.clients.claim())
  })
}
