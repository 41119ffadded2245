import { useEventListener, useStorage } from '@vueuse/core'
import { actionOf, forgetKey, learnKey, readKeyMap, usualKeys } from '#shared/bench/keys'
import type { BenchAction, KeyMap } from '#shared/bench/keys'

/** The keys of this device, as it keeps them; `learning` is the action that the next press is for. */
const makeKeys = () => {
  const kept = useStorage<unknown>('bench keys', usualKeys, undefined, { initOnMounted: true, serializer: { read: text => readKeyMap(JSON.parse(text)), write: JSON.stringify } })
  const map = computed((): KeyMap => readKeyMap(kept.value))
  const learning = ref<BenchAction | null>(null)
  const outcome = ref<{ action: BenchAction, key: string, learned: boolean } | null>(null)
  function learn(key: string) {
    const action = learning.value
    if (action === null) return
    const done = learnKey(map.value, action, key)
    if ('problem' in done && done.problem === 'silent') return
    if ('map' in done) kept.value = done.map
    outcome.value = { action, key, learned: 'map' in done }
    learning.value = null
  }
  function keep(next: KeyMap) {
    kept.value = next
  }
  return { map, learning, outcome, learn, forget: (action: BenchAction) => keep(forgetKey(map.value, action)), reset: () => keep(usualKeys) }
}

const writes = (target: EventTarget | null) => target instanceof HTMLElement && target.closest('input:not([type="radio"]):not([type="checkbox"]), select, textarea') !== null

/**
 * Keys and foot-switches of a bench tablet: what they do, and learning another by pressing it once. Nothing is done while a
 * sheet lies open or somebody types.
 * @param act does what was pressed
 */
export function useBenchKeys(act: (action: BenchAction) => void) {
  const keys = makeKeys()
  let lastAt: number | null = null
  if (import.meta.client) {
    useEventListener(window, 'keydown', (event) => {
      if (keys.learning.value !== null) {
        event.preventDefault()
        event.stopPropagation()
        keys.learn(event.key)
        return
      }
      if (writes(event.target) || document.querySelector('dialog[open]')) return
      const action = actionOf(keys.map.value, { key: event.key, repeat: event.repeat, at: event.timeStamp }, lastAt)
      if (action === null) return
      event.preventDefault()
      lastAt = event.timeStamp
      act(action)
    }, { capture: true })
  }
  return keys
}
