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
import type { ActDetail } from '#shared/words/steps'
import type { ManyPart } from '#shared/many-acts'
import type { ToldLine } from '~/stores/told'
import type { Told } from '~/stores/untold'

type Studio = Awaited<ReturnType<typeof useStudio>>

/** What a page tells: the kind, what it says, when, and words for its step or material; `names` where the pieces' own do not say all. */
export interface Telling { kind: TellableKind, body: ActRequest['body'], pieces: readonly Pick<PieceState, 'id' | 'name' | 'version'>[], doneAt: number, partIds?: number[], step?: string | null, material?: string | null, detail?: ActDetail, bundle?: number | null, names?: string }

function factOf({ kind, body, step, material, detail }: Telling): string {
  const milestone = milestoneNames.find(name => name === body.milestone) ?? null
  const text = (value: unknown) => (typeof value === 'string' ? value : null)
  return actText(kind, { step, material, milestone, reached: body.reached === true, reason: text(body.reason), air: kind === 'air' ? body.kind as 'sun' : null, ...detail })
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
const baseOf = (telling: Telling) => ({ by: useUntoldStore().memberId, kind: telling.kind, body: telling.body, partIds: telling.partIds, pieceIds: telling.pieces.map(piece => piece.id), step: telling.step ?? null, material: telling.material ?? null, detail: telling.detail ?? {}, bundle: telling.bundle ?? null, fact: factOf(telling), names: telling.names ?? groupNames(telling.pieces.map(piece => piece.name)), doneAt: telling.doneAt })

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

/** The three answers, for everything that waited for them. */
async function answerAll(waiting: readonly { telling: Telling }[], current: (ids: readonly number[]) => PieceState[], say: (telling: Telling, vapour: VapourAnswers) => Promise<unknown>, vapour: VapourAnswers) {
  for (const { telling } of waiting) await say({ ...telling, pieces: current(telling.pieces.map(piece => piece.id)) }, vapour)
}

/** The most pieces one act speaks of. */
const mostPieces = 200

/** Several acts in one go, undone in one go; each on as many pieces as one act may speak of, with the versions that the one before has left. */
function inOneGo(told: ReturnType<typeof useToldStore>, current: (ids: readonly number[]) => PieceState[], say: (telling: Telling) => Promise<unknown>) {
  return async (parts: readonly ManyPart[], doneAt: number, detail: ActDetail = {}) => {
    const bundle = told.newBundle()
    for (const part of parts) {
      for (let from = 0; from < part.pieceIds.length; from += mostPieces) {
        const pieces = current(part.pieceIds.slice(from, from + mostPieces))
        const own = new Set(pieces.flatMap(piece => piece.groups.flatMap(group => group.parts.map(each => each.partId))))
        if (pieces.length > 0) await say({ ...part, pieces, partIds: part.partIds?.filter(id => own.has(id)), doneAt, detail, bundle })
      }
    }
  }
}

/** Takes back a line, and all that was told in one go with it, the last first. */
function undoing(told: ReturnType<typeof useToldStore>, takeBack: (line: ToldLine) => Promise<unknown>, dropLater: (line: ToldLine) => void) {
  return async (line: ToldLine) => {
    const all = line.bundle === null ? [line] : told.lines.filter(each => each.bundle === line.bundle)
    for (const each of all.toReversed()) {
      if (each.state === 'told') await takeBack(each)
      else if (each.state === 'later') dropLater(each)
    }
  }
}

function makeTelling(studio: Studio) {
  const { tell, correct, busy } = useActs()
  const told = useToldStore()
  const dropLater = lateTaps(told)
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
    await say({ kind: line.kind, body: line.body, pieces: current(line.pieceIds), doneAt: line.doneAt, partIds: line.partIds, step: line.step, material: line.material, detail: line.detail, names: line.names })
  }

  return { say, sayAll: inOneGo(told, current, say), again, dropLater, busy, told, asked, answer: (vapour: VapourAnswers) => answerAll(takeWaiting(), current, say, vapour), leave: () => void takeWaiting(), undo: undoing(told, line => amend(line, { takeBack: true }), dropLater), move: (line: ToldLine, doneAt: number) => amend(line, { doneAt }) }
}

type TellingOnPage = ReturnType<typeof makeTelling> & { studio: Studio }
const key: InjectionKey<TellingOnPage> = Symbol('telling')

/** Lets everything on a page tell acts and read the studio they are about. */
export function provideTelling(studio: Studio): TellingOnPage {
  return provideTellingAs({ ...makeTelling(studio), studio })
}

/** The same telling, with some of it done another way beneath this component. */
export function provideTellingAs(telling: TellingOnPage): TellingOnPage {
  provide(key, telling)
  return telling
}

/** The telling of the page around. */
export function useTelling(): TellingOnPage {
  const telling = inject(key)
  if (!telling) throw new Error('This component belongs on a page that provides telling.')
  return telling
}
