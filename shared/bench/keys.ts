/** What a foot-switch or a key of a keyboard can do at a bench tablet. A foot-switch is a keyboard with one key. */
export const benchActions = ['next', 'done', 'not yet', 'undo'] as const
export type BenchAction = typeof benchActions[number]
/** By what a key sends: `KeyboardEvent.key`. Null: no key does it. */
export type KeyMap = Readonly<Record<BenchAction, string | null>>

/** Keys that no page, reader or browser wants for itself. */
export const usualKeys: KeyMap = { 'next': 'PageDown', 'done': 'F8', 'not yet': 'F9', 'undo': 'End' }

/** Keys a page is worked with: whoever has no pointer would be locked out of it. */
const kept = ['Tab', 'Enter', ' ', 'Escape', 'ArrowUp', 'ArrowDown', 'ArrowLeft', 'ArrowRight']
const silent = ['Shift', 'Control', 'Alt', 'AltGraph', 'Meta', 'CapsLock', 'NumLock', 'Dead', 'Process', 'Unidentified', 'Fn']
/** A worn switch sends its key twice: what comes sooner than this after the last is the same press. ms, planning value. */
const bounceMs = 300

export type Learned = { map: KeyMap } | { problem: 'kept' | 'silent' }

/** Gives a key to an action; whatever did the same key before lets it go. `silent` keys are passed over, not refused. */
export function learnKey(map: KeyMap, action: BenchAction, key: string): Learned {
  if (silent.includes(key)) return { problem: 'silent' }
  if (kept.includes(key)) return { problem: 'kept' }
  const freed = Object.fromEntries(benchActions.map(each => [each, map[each] === key ? null : map[each]])) as Record<BenchAction, string | null>
  return { map: { ...freed, [action]: key } }
}

export const forgetKey = (map: KeyMap, action: BenchAction): KeyMap => ({ ...map, [action]: null })

/**
 * What a press does; null when it does nothing, is held down, or comes from a worn switch.
 * @param lastAt ms of the last press that did something, null before the first
 */
export function actionOf(map: KeyMap, press: { key: string, repeat: boolean, at: number }, lastAt: number | null): BenchAction | null {
  if (press.repeat || (lastAt !== null && Math.abs(press.at - lastAt) < bounceMs)) return null
  return benchActions.find(action => map[action] === press.key) ?? null
}

/** A map as the device kept it; what cannot be read is as it is at first. */
export function readKeyMap(kept: unknown): KeyMap {
  if (typeof kept !== 'object' || kept === null) return usualKeys
  const entry = (action: BenchAction) => {
    const value: unknown = (kept as Record<string, unknown>)[action]
    return value === null || (typeof value === 'string' && value !== '' && value.length <= 40) ? value : usualKeys[action]
  }
  return Object.fromEntries(benchActions.map(action => [action, entry(action)])) as Record<BenchAction, string | null>
}
