/** Why there is no worker: plain http in a studio's network, or a browser without them. */
export type WorkerState = 'none yet' | 'ready' | 'not over plain http' | 'not in this browser' | 'failed'

/** Registers the worker that receives calls and stands in for a studio out of reach. Asking twice gives the same registration. */
export function useServiceWorker() {
  const state = useState<WorkerState>('service-worker', () => 'none yet')
  const registration = shallowRef<ServiceWorkerRegistration | null>(null)

  async function register(): Promise<ServiceWorkerRegistration | null> {
    if (!window.isSecureContext) state.value = 'not over plain http'
    else if (!('serviceWorker' in navigator)) state.value = 'not in this browser'
    else {
      try {
        registration.value = await navigator.serviceWorker.register('/sw.js')
        state.value = 'ready'
      }
      catch {
        state.value = 'failed'
      }
    }
    return registration.value
  }

  return { state, registration, register }
}
