/** A new worker replaces the old one at once: it keeps no pages, so nothing can be mixed up. */
export function takeOver(scope: ServiceWorkerGlobalScope) {
  scope.addEventListener('install', (event) => {
    event.waitUntil(scope.skipWaiting())
  })
  scope.addEventListener('activate', (event) => {
    event.waitUntil(scope.clients.claim())
  })
}
