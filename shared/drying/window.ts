import type { DryingMaterial } from '#shared/drying/types'

/** Where a coat stands with its recoat windows: `window` is the index of the open one, `opensAfter` the sheet minutes of the next, if any. */
export type WindowState =
  | { kind: 'open', window: number | null }
  | { kind: 'not yet', opensAfter: number | null }
  | { kind: 'missed' }

/**
 * The material's own recoat rule, in minutes of its sheet and without doubt: for one coat at the reference climate.
 * Open inside a window and past ready-to-recoat (a window that starts at 0 asks for no rung: the coat goes on wet); without windows, open
 * past ready-to-recoat. `not yet` before a window to come, also in the gap between two; `missed` after the last. `minutes` 0 or more.
 */
export function windowAt(material: Pick<DryingMaterial, 'milestones' | 'windows'>, minutes: number): WindowState {
  if (!(minutes >= 0)) throw new RangeError(`minutes: expected 0 or more, got ${minutes}`)
  const ready = material.milestones.find(m => m.name === 'ready-to-recoat')?.typical ?? 0
  if (material.windows.length === 0) return minutes >= ready ? { kind: 'open', window: null } : { kind: 'not yet', opensAfter: ready }
  const opens = ([from]: readonly [number | null, number | null]) => from === null || from === 0 ? 0 : Math.max(from, ready)
  const inside = material.windows.findIndex(window => minutes >= opens(window) && (window[1] === null || minutes <= window[1]))
  if (inside >= 0) return { kind: 'open', window: inside }
  const ahead = material.windows.map(opens).filter(from => from > minutes)
  return ahead.length > 0 ? { kind: 'not yet', opensAfter: Math.min(...ahead) } : { kind: 'missed' }
}
