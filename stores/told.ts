import { defineStore } from 'pinia'
import type { Effect } from '#shared/words/hands'
import type { ActDetail } from '#shared/words/steps'
import type { TellableKind, ActRequest } from '#shared/schemas/act'

/** One tap and what came of it, kept on the page until somebody has read it. */
export interface ToldLine {
  key: number
  /** Under which member's name a bench tablet recorded it; null at the bench, and on a person's own page. */
  by: number | null
  kind: TellableKind
  body: ActRequest['body']
  partIds?: number[]
  pieceIds: number[]
  step: string | null
  material: string | null
  /** "coat on: second varnish" and the pieces' names, in words. */
  fact: string
  names: string
  /** More of what the fact was about, such as the place. */
  detail: ActDetail
  /** What was told in one go has one number, and is undone in one go. */
  bundle: number | null
  doneAt: number
  state: 'told' | 'later' | 'refused' | 'undone'
  /** The key it waits under on this device while it is not told. */
  clientKey: string | null
  /** The act that now stands for it; another after each correction. */
  actId: number | null
  /** The first act of its corrections: films are known by it. */
  rootId: number | null
  /** What it did to the times, as it stands and as it stood before. */
  effect: string
  before: Effect | null
  problem: string | null
}

/** What was told on this page and not yet put away, the newest last. It outlives a change of screen. */
export const useToldStore = defineStore('told', () => {
  const lines = ref<ToldLine[]>([])
  let last = 0

  function add(line: Omit<ToldLine, 'key'>): ToldLine {
    const added = { ...line, key: ++last }
    const kept = lines.value.filter((each, index, all) => index >= all.length - 9 || (line.bundle !== null && each.bundle === line.bundle))
    lines.value = [...kept, added]
    return added
  }

  function change(key: number, changes: Partial<ToldLine>) {
    lines.value = lines.value.map(each => (each.key === key ? { ...each, ...changes } : each))
  }

  /** Puts a line away, with all that was told in one go with it. */
  function putAway(key: number) {
    const bundle = lines.value.find(each => each.key === key)?.bundle ?? null
    lines.value = lines.value.filter(each => each.key !== key && (bundle === null || each.bundle !== bundle))
  }

  let bundles = 0
  const newBundle = () => ++bundles

  return { lines, newBundle, add, change, putAway }
})
