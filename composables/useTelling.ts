import type { InjectionKey } from 'vue'
import { FetchError } from 'ofetch'
import { effectOfAct, wets } from '#shared/effects'
import type { EffectOf } from '#shared/effects'
import type { ActRequest, TellableKind, VapourAnswers } from '#shared/schemas/act'
import type { VapourAsked } from '#shared/schemas/vapour'
import type { PieceState, StudioState } from '#shared/schemas/piece-state'
import { movedFilms } from '#shared/moved'
import { milestoneNames } from '#shared/terms'
import { effectText, fellowsText, toldWords } from '#shared/words/hands'
import type { Effect } from '#shared/words/hands'
import { groupNames } from '#shared/words/group'
import { groupMoment } from '#shared/verdict/next'
import { momentText } from '#shared/words/moments'
import { actText } from '#shared/words/steps'
import type { ToldLine } from '~/stores/told'
import type { Told } from '~/stores/untold'

type Studio = Awaited<ReturnType<typeof useStudio>>

/** What a page tells: the kind, what it says, when, and words for its step or material. */
export interface Telling { kind: TellableKind, body: ActRequest['body'], pieces: readonly PieceState[], doneAt: number, partIds?: number[], step?: string | null, material?: string | null }

function factOf({ kind, body, step, material }: Telling): string {
  const milestone = milestoneNames.find(name => name === body.milestone) ?? null
  const text = (value: unknown) => (typeof value === 'string' ? value : null)
  return actText(kind, { step, material, milestone, reached: body.reached === true, reason: text(body.reason), air: kind === 'air' ? body.kind as 'sun' : null })
}

const problemOf = (error: unknown) => (error instanceof FetchError && typeof error.data?.data?.message === 'string' ? error.data.data.message as string : toldWords.notReached)

/**
 * Follows the taps that wait on this device: told late, one stands as any other from then on.
 * @returns what takes one off the device again, without a word to the studio
 */
function lateTaps(told: ReturnType<typeof useToldStore>) {
  const untold = useUntoldStore()
  watch(() => untold.arrived, (arrived) => {
    for (const line of told.lines) {
      const actId = line.clientKey === null ? undefined : arrived[line.clientKey]
      if (actId !== undefined) told.change(line.key, { state: 'told', clientKey: null, actId, rootId: actId })
    }
  })
  // Refused late, a tap is spoken of where the untold stand: it may be from before this page was opened.
  watch(() => untold.refused, (refused) => {
    for (const line of told.lines) if (refused.some(({ act }) => act.clientKey === line.clientKey)) told.putAway(line.key)
  })
  return (line: ToldLine) => {
    if (line.clientKey === null) return
    untold.drop(line.clientKey)
    told.change(line.key, { state: 'undone', clientKey: null })
  }
}

/** The question that came in place of an answer: solvent work wants three things said first. */
function questionIn(answer: Told): VapourAsked | null {
  const current = answer.outcome === 'refused' ? answer.current : null
  return typeof current === 'object' && current !== null && 'ask' in current && current.ask === 'vapour' ? current as VapourAsked : null
}

/** What a test taught about films of other pieces, in words; empty where it moved none. */
function fellowsMoved(kind: TellableKind, before: StudioState | null, after: StudioState | null, own: readonly number[]): string {
  if (kind !== 'touch test' || !before || !after) return ''
  const others = (state: StudioState) => ({ ...state, pieces: state.pieces.filter(piece => !own.includes(piece.id)) })
  const { count, mostMs } = movedFilms(others(before), others(after))
  return fellowsText(count, mostMs)
}

/** What a line on the page keeps of a telling, whatever came of it. */
const baseOf = (telling: Telling) => ({ kind: telling.kind, body: telling.body, partIds: telling.partIds, pieceIds: telling.pieces.map(piece => piece.id), step: telling.step ?? null, material: telling.material ?? null, fact: factOf(telling), names: groupNames(telling.pieces.map(piece => piece.name)), doneAt: telling.doneAt })

/** Solvent work that waits for its three answers: nothing of it is recorded before. */
function waitingWork() {
  const asked = shallowRef<{ telling: Telling, what: VapourAsked }[]>([])
  function wait(telling: Telling, what: VapourAsked) {
    asked.value = [...asked.value, { telling, what }]
    return null
  }
  function takeWaiting() {
    const waiting = asked.value
    asked.value = []
    return waiting
  }
  return { asked, wait, takeWaiting }
}

function makeTelling(studio: Studio) {
  const { tell, correct, busy } = useActs()
  const told = useToldStore()
  const current = (ids: readonly number[]) => (studio.state.value?.pieces ?? []).filter(piece => ids.includes(piece.id))
  const effectNow = (line: EffectOf & Pick<ToldLine, 'pieceIds'>) => effectOfAct(current(line.pieceIds), line)

  /** What the times say now, beside what they said before; or the next moment where no time is at stake. */
  function describe(line: EffectOf & Pick<ToldLine, 'pieceIds' | 'before'>): { effect: string, now: Effect | null } {
    const effect = effectNow(line)
    if (effect) return { effect: effectText(effect, line.before, studio.clock.value), now: effect }
    const next = groupMoment(studio.pieces.value.flatMap(read => (line.pieceIds.includes(read.piece.id) ? read.next ?? [] : [])))
    return { effect: next ? toldWords.next(momentText(next, studio.clock.value)) : '', now: null }
  }
  const { asked, wait, takeWaiting } = waitingWork()
  async function say(telling: Telling, vapour?: VapourAnswers) {
    const base = baseOf(telling)
    const [stood, before] = [studio.state.value, wets(telling.kind) ? null : effectNow({ ...base, rootId: null })]
    const answer = await tell(telling.kind, telling.pieces, telling.body, telling.doneAt, telling.partIds, vapour)
    const blank = { ...base, clientKey: null, actId: null, rootId: null, effect: '', before, problem: null }
    if (answer.outcome === 'later') return told.add({ ...blank, state: 'later', clientKey: answer.clientKey })
    const question = questionIn(answer)
    if (question) return wait(telling, question)
    if (answer.outcome === 'refused') return told.add({ ...blank, state: 'refused', problem: Object.values(answer.fields)[0] ?? answer.message })
    const { effect, now } = describe({ ...blank, rootId: answer.actId })
    return told.add({ ...blank, state: 'told', actId: answer.actId, rootId: answer.actId, effect: [effect, fellowsMoved(telling.kind, stood, studio.state.value, blank.pieceIds)].filter(Boolean).join(' '), before: now })
  }

  /** The three answers, for everything that waits for them. */
  async function answer(vapour: VapourAnswers) {
    for (const { telling } of takeWaiting()) await say({ ...telling, pieces: current(telling.pieces.map(piece => piece.id)) }, vapour)
  }

  async function amend(line: ToldLine, change: { doneAt?: number, takeBack?: boolean }) {
    if (line.actId === null || busy.value) return
    busy.value = true
    try {
      const actId = await correct(line.actId, change)
      const moved = { ...line, actId, doneAt: change.doneAt ?? line.doneAt }
      const { effect, now } = describe(moved)
      told.change(line.key, change.takeBack ? { state: 'undone', actId: null, problem: null } : { actId, doneAt: moved.doneAt, effect, before: now, problem: null })
    }
    catch (error) {
      told.change(line.key, { problem: problemOf(error) })
      await studio.reload()
    }
    finally {
      busy.value = false
    }
  }

  /** After somebody else was first: the same tap on the pieces as they stand now. */
  async function again(line: ToldLine) {
    told.putAway(line.key)
    await say({ kind: line.kind, body: line.body, pieces: current(line.pieceIds), doneAt: line.doneAt, partIds: line.partIds, step: line.step, material: line.material })
  }

  return { say, again, dropLater: lateTaps(told), busy, told, asked, answer, leave: () => void takeWaiting(), undo: (line: ToldLine) => amend(line, { takeBack: true }), move: (line: ToldLine, doneAt: number) => amend(line, { doneAt }) }
}

type TellingOnPage = ReturnType<typeof makeTelling> & { studio: Studio }
const key: InjectionKey<TellingOnPage> = Symbol('telling')

/** Lets everything on a page tell acts and read the studio they are about. */
export function provideTelling(studio: Studio): TellingOnPage {
  const telling = { ...makeTelling(studio), studio }
  provide(key, telling)
  return telling
}

/** The telling of the page around. */
export function useTelling(): TellingOnPage {
  const telling = inject(key)
  if (!telling) throw new Error('This component belongs on a page that provides telling.')
  return telling
}
