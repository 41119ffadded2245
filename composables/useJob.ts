import { controlWords } from '#shared/words/controls'
import type { ComputedRef } from 'vue'
import { actsOf, filmsOf } from '#shared/hands-acts'
import type { ActChoice } from '#shared/hands-acts'
import type { Job } from '#shared/hands'
import { solventRooms } from '#shared/solvent-rooms'
import { filmStrip, withFirstShut, worstFilm } from '#shared/piece-strip'
import { may, mayDoStep } from '#shared/permissions'
import { answeredAt } from '#shared/time'
import type { TimeAnswer } from '#shared/time'
import { handsWords, jobMoment, jobNames, jobTitle } from '#shared/words/hands'
import type { ActDetail } from '#shared/words/steps'
import { isUntold } from '#shared/verdict/untold'
import { listText } from '#shared/words/group'

/** One job on the page: its words, its strip, which of its pieces are meant, when it was done, and the telling. */
export function useJob(job: ComputedRef<Job>) {
  const { say, busy, studio } = useTelling()
  const untold = useUntoldStore()

  const left = ref<number[]>([])
  const when = ref<TimeAnswer | null>({ kind: 'ago', minutes: 0 })
  const placeId = ref<number | null>(null)
  const problem = ref<string | null>(null)

  const title = computed(() => jobTitle(job.value))
  const names = computed(() => jobNames(job.value))
  const meant = computed(() => job.value.pieces.filter(each => !left.value.includes(each.read.piece.id)))
  /** What a key that tells is about: the pieces that are meant, all of them while none is. */
  const meantNames = computed(() => (meant.value.length > 0 ? jobNames({ pieces: meant.value }) : names.value))
  const wanted = computed(() => job.value.tests ?? (job.value.kind === 'release' ? 'out-of-clamps' as const : 'dry-to-handle' as const))
  const films = computed(() => filmsOf(job.value.pieces).filter(film => job.value.kind !== 'release' || film.hold !== null))
  const film = computed(() => worstFilm(films.value, wanted.value))
  const moment = computed(() => jobMoment(job.value, film.value, studio.clock.value))
  const strip = computed(() => (film.value && film.value.coatId > 0 ? filmStrip(withFirstShut(film.value, films.value), wanted.value, job.value.turn, studio.now.value, studio.zone.value.name) : null))
  const where = computed(() => {
    const ids = new Set(job.value.pieces.flatMap(({ read, turn }) => read.piece.groups.filter(group => group.parts.some(part => turn.turn.partIds.includes(part.partId))).map(group => group.placeId)))
    return listText((studio.state.value?.places ?? []).filter(place => ids.has(place.id)).map(place => place.name))
  })
  const acts = computed(() => {
    const who = studio.who.value
    const wet = solventRooms(studio.pieces.value.map(read => read.piece), studio.now.value)
    const solventRoom = job.value.pieces.some(({ read }) => read.piece.groups.some(group => group.roomId !== null && wet.has(group.roomId)))
    return actsOf(job.value, { solventRoom, maker: who ? may(who.role, 'start batches') : false, step: who ? mayDoStep(who.role, who.helperKinds, job.value.turn.step.kind) : false })
  })
  const isLater = computed(() => job.value.pieces.some(each => isUntold(each.read.piece.id, untold.acts)))

  /** Tells a choice about the pieces that are meant. True once it was told, kept or refused; the sheet says which. */
  async function choose(act: ActChoice, detail: ActDetail = {}): Promise<boolean> {
    problem.value = meant.value.length === 0 ? handsWords.noneChosen : when.value === null ? controlWords.timeWanted : null
    if (problem.value !== null || when.value === null || busy.value) return false
    const goes = placeId.value !== null && (act.kind === 'glue-up on' || act.kind === 'it is out') ? { placeId: placeId.value } : {}
    const partIds = act.perPart ? [...new Set(meant.value.flatMap(each => each.turn.turn.partIds))] : undefined
    await say({ kind: act.kind, body: { ...act.body, ...goes }, pieces: meant.value.map(each => each.read.piece), doneAt: answeredAt(when.value, studio.now.value), partIds, step: job.value.turn.step.name, detail })
    left.value = []
    when.value = { kind: 'ago', minutes: 0 }
    return true
  }

  return { left, when, placeId, problem, title, names, meantNames, where, moment, films, film, strip, acts, isLater, choose, busy, studio }
}
