import type { SubscriptionWire } from '#shared/schemas/telling'
import { FetchError } from 'ofetch'
import { pushStates } from '#shared/words/call-settings'
import { ServerRefusal, lookUp, subscribe, unsubscribe } from './push/steps'
import type { BrowserParts, PushOutcome, PushServer } from './push/steps'

/** Turns a refusal into one the steps know; whatever else went wrong means that the server was not reached. */
async function ask<T>(call: Promise<T>): Promise<T> {
  return call.catch((error: unknown) => {
    const data: unknown = error instanceof FetchError ? error.data?.data : null
    const told = typeof data === 'object' && data !== null && 'message' in data && typeof data.message === 'string'
    throw told ? new ServerRefusal(data.message as string) : error
  })
}

const server: PushServer = {
  key: async () => (await ask(callApi<{ publicKey: string }>('/api/push/key'))).publicKey,
  list: () => ask(callApi<SubscriptionWire[]>('/api/push/subscriptions')),
  save: subscription => ask(callApi('/api/push/subscriptions', { method: 'POST', body: { ...subscription, device: deviceName() } })),
  end: id => ask(callApi(`/api/push/subscriptions/${id}`, { method: 'DELETE' })),
}

function deviceName() {
  const { width } = window.screen
  return width < 600 ? 'phone' : width < 1100 ? 'tablet' : 'computer'
}

/** Whether calls reach this browser, with a sentence for every way in which they do not, and the two keys for it. */
export function usePushSubscription() {
  const { state: worker, register } = useServiceWorker()
  const outcome = ref<PushOutcome>({ state: 'looking', message: null })
  const busy = ref(false)

  const browser: BrowserParts = {
    get hasPush() { return 'PushManager' in window && 'Notification' in window },
    permission: () => Notification.permission,
    askPermission: () => Notification.requestPermission(),
    register: async () => {
      const registration = await register()
      if (registration) return { registration }
      if (worker.value === 'not over plain http') return { state: 'needs https' }
      return { state: worker.value === 'not in this browser' ? 'not supported' : 'no service worker' }
    },
  }

  async function run(step: typeof lookUp) {
    if (busy.value) return
    busy.value = true
    try {
      outcome.value = await step(browser, server)
    }
    finally {
      busy.value = false
    }
  }

  onMounted(() => run(lookUp))
  const sentence = computed(() => outcome.value.message ?? pushStates[outcome.value.state])
  return { state: computed(() => outcome.value.state), sentence, busy: readonly(busy), subscribe: () => run(subscribe), unsubscribe: () => run(unsubscribe) }
}
