import type { ComputedRef } from 'vue'
import { controlWords } from '#shared/words/controls'
import { faceNamesOf, meantOf, partNamesOf, piecesByPlace, putOnParts } from '#shared/put-on'
import { groupNames } from '#shared/words/group'
import { partsOfNames } from '#shared/words/parts-said'
import type { PutOnPart } from '#shared/put-on'
import type { ReadPiece } from '#shared/verdict/piece'
import type { RecentMaterialsWire, RecentMaterialWire } from '#shared/schemas/material'
import { coatSizes, holds } from '#shared/terms'
import type { CoatSize, Hold } from '#shared/terms'
import { answeredAt } from '#shared/time'
import type { TimeAnswer } from '#shared/time'
import { holdWords, putOnWords, sizeWords } from '#shared/words/put-on'

/** The pieces that another page has chosen already, such as those of a shelf whose tag was read. */
const askedPieces = (query: unknown) => typeof query === 'string' ? query.split(',').map(Number).filter(id => Number.isInteger(id) && id > 0) : []

/** The names of the parts that it went on, where the other page means some alone. */
const askedParts = (query: unknown): string[] => [query].flat().filter(name => typeof name === 'string')

/** The parts and faces that something goes on, by their names: none named, all of them. A name that the chosen pieces do not have counts for nothing. */
function useOnParts(reads: ComputedRef<readonly ReadPiece[]>, asked: string[]) {
  const partNames = ref<string[]>(asked)
  const faceNames = ref<string[]>([])
  const { faces, failed, waits, again } = useFaces(reads)
  const parts = computed(() => partNamesOf(reads.value))
  const onParts = computed(() => partNames.value.filter(name => parts.value.includes(name)))
  const sides = computed(() => faceNamesOf(faces.value, reads.value, onParts.value))
  const onFaces = computed(() => faceNames.value.filter(name => sides.value.includes(name)))
  const meant = computed(() => meantOf(reads.value, onParts.value, faces.value, onFaces.value))
  const named = (pieces: readonly ReadPiece[]) => partsOfNames(groupNames(pieces.map(read => read.piece.name)), onParts.value, onFaces.value)
  function wholeAgain() {
    partNames.value = []
    faceNames.value = []
  }
  return { partNames, faceNames, onParts, onFaces, parts, sides, meant, failed, waits, again, named, wholeAgain }
}

/** Everything "I put something on" remembers between its taps, and the telling at the end. */
export function usePutOn({ say, busy, studio }: ReturnType<typeof provideTelling>, materials: Ref<RecentMaterialsWire | null>) {
  // A key of the hands' page has said what it is.
  const materialId = ref<number | null>(Number(useRoute().query.material) || null)
  const chosen = ref<number[]>(askedPieces(useRoute().query.pieces))
  const when = ref<TimeAnswer | null>({ kind: 'ago', minutes: 0 })
  const size = ref<CoatSize | null>('normal')
  const hold = ref<Hold | 'free' | null>('free')
  const problem = ref<string | null>(null)

  const all = computed(() => [...materials.value?.recent ?? [], ...materials.value?.others ?? []])
  const material = computed((): RecentMaterialWire | null => all.value.find(each => each.versionId === materialId.value) ?? null)
  const places = computed(() => (studio.state.value ? piecesByPlace(studio.state.value, studio.pieces.value) : []))
  const reads = computed(() => studio.pieces.value.filter(read => chosen.value.includes(read.piece.id)))
  const on = useOnParts(reads, askedParts(useRoute().query.part))
  const parts = computed(() => (material.value ? putOnParts(on.meant.value.pieces, material.value, on.meant.value) : []))

  const sizes = coatSizes.map(value => ({ value, label: sizeWords[value] }))
  const holdings = [{ value: 'free' as const, label: putOnWords.free }, ...holds.map(value => ({ value, label: holdWords[value] }))]

  /** Tells one part: its step, or no step at all. */
  async function tellPart({ step, pieces }: PutOnPart, what: RecentMaterialWire, doneAt: number) {
    const glue = step ? step.kind === 'glue-up' : what.glue
    const { partIds, faces } = on.meant.value
    const body = { step: step?.key ?? null, ...step === null && faces ? { faces } : {}, materialVersionId: what.versionId, size: size.value ?? 'normal', ...step === null ? { name: what.name } : {}, ...glue && hold.value !== null && hold.value !== 'free' ? { hold: hold.value } : {} }
    await say({ kind: glue ? 'glue-up on' : 'coat on', body, pieces: pieces.map(read => read.piece), doneAt, ...step === null ? { partIds, names: on.named(pieces) } : {}, step: step?.name ?? null, material: what.name })
  }

  /** @param asSteps whether pieces that wait for this material take it as the step that waits */
  async function done(asSteps: boolean) {
    const what = material.value
    problem.value = !what ? putOnWords.wantsMaterial : on.meant.value.pieces.length === 0 ? putOnWords.wantsPieces : when.value === null ? controlWords.timeWanted : null
    if (problem.value !== null || !what || when.value === null || busy.value) return
    const doneAt = answeredAt(when.value, studio.now.value)
    const told = chosen.value
    for (const part of asSteps ? parts.value : [{ step: null, pieces: on.meant.value.pieces }]) await tellPart(part, what, doneAt)
    // A piece chosen meanwhile is meant for what is told next.
    chosen.value = chosen.value.filter(id => !told.includes(id))
    on.wholeAgain()
    when.value = { kind: 'ago', minutes: 0 }
    size.value = 'normal'
  }

  return { materialId, chosen, when, size, hold, problem, all, material, places, reads, on, parts, sizes, holdings, done, busy, studio }
}
