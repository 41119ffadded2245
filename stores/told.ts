import { defineStore } from 'pinia'
import type { Effect } from '#shared/words/hands'
import type { TellableKind, ActRequest } from '#shared/schemas/act'

/** One tap and what came of it, kept on the page until somebody has read it. */
export interface ToldLine {
  key: number
  kind: TellableKind
  body: ActRequest['body']
  partIds?: number[]
  pieceIds: number[]
  step: string | null
  material: string | null
  /** "coat on: second varnish" and the pieces' names, in words. */
  fact: string
  names: string
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
    lines.value = [...lines.value.slice(-9), added]
    return added
  }

  function change(key: number, changes: Partial<ToldLine>) {
    lines.value = lines.value.map(each => (each.key === key ? { ...each, ...changes } : each))
  }

  const putAway = (key: number) => { lines.value = lines.value.filter(each => each.key !== key) }

  return { lines, add, change, putAway }
})
