import { usualDust } from '#shared/step-kinds'
import type { MilestoneName, Risk } from '#shared/terms'
import type { LibraryCheck, LibraryLink, LibraryPart, LibraryStep, LibraryTarget } from '#shared/library/types'

/** Attended minutes: setting up, each piece, cleaning up, taking out of clamps. */
type Minutes = readonly [setup: number, piece: number, clean?: number, release?: number]
type Extra = Partial<Omit<LibraryStep, 'key' | 'name' | 'kind' | 'material' | 'targets' | 'setupMin' | 'pieceMin' | 'cleanMin' | 'releaseMin'>>

/** A part with its faces given as `key: name`. */
export function part(key: string, name: string, grip: string | null, faces: Record<string, string> = {}, into?: string): LibraryPart {
  return { key, name, grip, faces: Object.entries(faces).map(([face, label]) => ({ key: face, name: label })), ...(into ? { into } : {}) }
}

/** Targets written as `part` or `part.face`, apart by spaces. */
function targets(text: string): LibraryTarget[] {
  return text.split(' ').map((word) => {
    const [partKey = '', face] = word.split('.')
    return face ? { part: partKey, face } : { part: partKey }
  })
}

function step(kind: LibraryStep['kind'], key: string, name: string, minutes: Minutes, on: string, extra: Extra): LibraryStep {
  const [setupMin, pieceMin, cleanMin = 0, releaseMin = 0] = minutes
  return {
    key, name, kind, coatSize: 'normal', ground: 'primed', perDay: 1, days: 1, untilEnough: false,
    setupMin, pieceMin, cleanMin, releaseMin, hands: 1, dust: usualDust[kind], mayRunOver: false, targets: targets(on), checks: [], ...extra,
  }
}

export const coat = (key: string, name: string, material: string, minutes: Minutes, on: string, extra: Extra = {}): LibraryStep =>
  ({ ...step('coat', key, name, minutes, on, extra), material })

export const glueUp = (key: string, name: string, material: string, minutes: Minutes, on: string, extra: Extra = {}): LibraryStep =>
  ({ ...step('glue-up', key, name, minutes, on, extra), material })

export const lightSanding = (key: string, name: string, minutes: Minutes, on: string, extra: Extra = {}): LibraryStep =>
  step('light sanding', key, name, minutes, on, extra)

export const flatSanding = (key: string, name: string, minutes: Minutes, on: string, extra: Extra = {}): LibraryStep =>
  step('flat sanding', key, name, minutes, on, extra)

export const levelling = (key: string, name: string, minutes: Minutes, on: string, extra: Extra = {}): LibraryStep =>
  step('levelling', key, name, minutes, on, extra)

export const turnOver = (key: string, name: string, minutes: Minutes, on: string): LibraryStep =>
  step('turn over', key, name, minutes, on, {})

export const benchWork = (key: string, name: string, minutes: Minutes, on: string, extra: Extra = {}): LibraryStep =>
  step('bench work', key, name, minutes, on, extra)

export const packing = (key: string, name: string, minutes: Minutes, on: string): LibraryStep =>
  step('packing', key, name, minutes, on, {})

export const look = (name: string, afterMin: number, minutes: number): LibraryCheck => ({ name, afterMin, minutes })

const link = (from: string, to: string, milestone: MilestoneName | null, risk: Risk, windowed: boolean): LibraryLink => ({ from, to, milestone, risk, windowed })

/** When the work of `from` is done. */
export const done = (from: string, to: string): LibraryLink => link(from, to, null, 'p90', false)

/** Hard enough to rub down: the middle of the forecast will do, sandpaper tells the rest. */
export const sandable = (from: string, to: string, milestone: MilestoneName = 'dry-to-sand-lightly'): LibraryLink => link(from, to, milestone, 'likely', false)

/** Ready for the next coat, at nine in ten. */
export const recoatable = (from: string, to: string, milestone: MilestoneName = 'ready-to-recoat'): LibraryLink => link(from, to, milestone, 'p90', false)

/** Ready for the next coat and before the window shuts. */
export const inWindow = (from: string, to: string, milestone: MilestoneName | null = 'ready-to-recoat', risk: Risk = 'p90'): LibraryLink => link(from, to, milestone, risk, true)

/** Ready to be handled, stacked, pressed or strained: at 98 in a hundred. */
export const strainable = (from: string, to: string, milestone: MilestoneName): LibraryLink => link(from, to, milestone, 'p98', false)
