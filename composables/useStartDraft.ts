import { partMistake, partsOf, rowsOf } from '#shared/parts'
import type { PartRow, PartShape } from '#shared/parts'
import type { BatchRequest } from '#shared/schemas/batch'
import type { BatchToComeRequest } from '#shared/schemas/promise'
import { fromLocal } from '#shared/time'
import type { StudioZone } from '#shared/time'
import { partMistakes } from '#shared/words/parts'
import { startWords } from '#shared/words/start'

const shelf = 'stillwet start'

/** What is typed to start a batch. `scheduleId` 0: no schedule; null: not chosen yet. `names` holds only those changed by hand. */
export interface StartDraft {
  clientKey: string
  scheduleId: number | null
  name: string
  count: number | null
  stem: string
  names: Record<number, string>
  sizeUnits: number | null
  placeId: number | null
  when: 'now' | 'afternoon' | 'opening' | 'other'
  day: string
  time: string
  orderName: string
  dueDay: string
  dueTime: string
  oldObject: boolean
  areaM2: number | null
  /** The day to promise with the start, ms UTC. */
  promiseAt: number | null
  promiseTell: string
  /** What each piece is made of where no schedule says it. The lines of every shape that was looked at are kept. */
  shape: PartShape
  partRows: Partial<Record<PartShape, PartRow[]>>
}

const blank = (): StartDraft => ({ clientKey: '', scheduleId: null, name: '', count: 1, stem: '', names: {}, sizeUnits: 1, placeId: null, when: 'now', day: '', time: '', orderName: '', dueDay: '', dueTime: '', oldObject: false, areaM2: null, promiseAt: null, promiseTell: '', shape: 'one', partRows: {} })

/** The lines of the form for the shape that is chosen. */
export const partRowsOf = (draft: Pick<StartDraft, 'shape' | 'partRows'>): PartRow[] => draft.partRows[draft.shape] ?? rowsOf(draft.shape)

/** Parts are typed only where no schedule has them. */
const hasOwnParts = ({ scheduleId, shape }: StartDraft) => scheduleId === 0 && shape !== 'one'

/** The sentence that a mistake in the lines is told in, under the name of its line. */
function partFields(draft: StartDraft): Record<string, string> {
  const rows = partRowsOf(draft)
  const mistake = hasOwnParts(draft) ? partMistake(rows) : null
  if (mistake === null) return {}
  const says = mistake.why === 'same' ? partMistakes.same(mistake.as + 1, rows[mistake.as]?.name.trim() ?? '') : partMistakes[mistake.why]
  return { [mistake.row === null ? 'parts' : `part ${mistake.row}`]: says }
}

/** "Ledger" from "Ledgers", for a start: what one piece of a batch may be called. */
export function stemOf(batchName: string): string {
  const name = batchName.trim()
  const last = name.split(/\s+/).at(-1) ?? ''
  const ending = /(?:x|ch|sh|ss)es$/.test(last) ? 2 : last.length > 3 && last.endsWith('s') && !last.endsWith('ss') ? 1 : 0
  const one = ending === 0 ? name : name.slice(0, -ending)
  return one.charAt(0).toUpperCase() + one.slice(1)
}

const minutesOf = (time: string) => {
  const [hours, minutes] = time.split(':').map(Number)
  return hours === undefined || minutes === undefined || !Number.isFinite(hours + minutes) ? null : hours * 60 + minutes
}

/** A day and a time as typed, as an instant (ms UTC) on the studio's wall; null while either is missing. */
export function typedInstant(day: string, time: string, zone: StudioZone): number | null {
  const minutes = minutesOf(time)
  return /^\d{4}-\d{2}-\d{2}$/.test(day) && minutes !== null ? fromLocal(day, minutes, zone) : null
}

/** The form of a new batch, kept in this tab until it has started: a reload or a refusal loses nothing. */
export function useStartDraft() {
  const draft = reactive(blank())
  let keeps = true
  onMounted(() => {
    try {
      const kept: unknown = JSON.parse(sessionStorage.getItem(shelf) ?? 'null')
      if (typeof kept === 'object' && kept !== null) Object.assign(draft, kept)
    }
    catch {
      sessionStorage.removeItem(shelf)
    }
    draft.clientKey ||= newClientKey()
    watch(draft, () => {
      if (keeps) sessionStorage.setItem(shelf, JSON.stringify(draft))
    }, { deep: true })
  })
  const stem = computed(() => draft.stem.trim() || stemOf(draft.name))
  const count = computed(() => Math.min(60, Math.max(0, Math.floor(draft.count ?? 0))))
  const names = computed(() => Array.from({ length: count.value }, (_, index) => draft.names[index] ?? (count.value === 1 ? stem.value : `${stem.value} ${index + 1}`.trim())))

  /** Keeps it no longer. What is typed stands until the page is left, so that nobody takes an emptied form for one that was lost. */
  function forget() {
    keeps = false
    sessionStorage.removeItem(shelf)
  }

  return { draft, stem, count, names, forget }
}

/** The request a draft makes, or the sentences by field that say what is missing before anybody is asked. */
export function requestOf(draft: StartDraft, names: readonly string[], startsAt: number | null, zone: StudioZone): { body: BatchRequest } | { fields: Record<string, string> } {
  const dueAt = draft.dueDay === '' ? null : typedInstant(draft.dueDay, draft.dueTime || '17:00', zone)
  const fields: Record<string, string> = {
    ...draft.scheduleId === null ? { scheduleId: startWords.wantSchedule } : {},
    ...partFields(draft),
    ...startsAt === null ? { startsAt: startWords.wantWhen } : {},
    ...names.length === 0 || draft.count === null || !Number.isInteger(draft.count) || draft.count > 60 ? { pieces: startWords.wantCount } : {},
    ...draft.placeId === null ? { placeId: startWords.wantPlace } : {},
    ...draft.dueDay === '' && draft.dueTime !== '' ? { 'order.dueAt': startWords.wantDue } : {},
    ...draft.orderName.trim() === '' && draft.dueDay !== '' ? { 'order.name': startWords.wantOrder } : {},
    ...draft.orderName.trim() === '' && draft.promiseAt !== null ? { 'order.name': startWords.wantWhom } : {},
  }
  if (Object.keys(fields).length > 0 || startsAt === null || draft.placeId === null) return { fields }
  return {
    body: {
      clientKey: draft.clientKey, name: draft.name, scheduleId: draft.scheduleId === 0 ? null : draft.scheduleId, pieces: [...names], sizeUnits: draft.sizeUnits ?? 1, placeId: draft.placeId,
      order: draft.orderName.trim() === '' ? null : { name: draft.orderName, dueAt: dueAt === null ? null : new Date(dueAt).toISOString() },
      startsAt: new Date(startsAt).toISOString(), oldObject: draft.oldObject, areaM2: draft.areaM2, ...hasOwnParts(draft) ? { parts: partsOf(partRowsOf(draft)) } : {},
    },
  }
}

/** What the sentence of a field is about, as it is typed now: one about an order can be mended by the date that asked for it. */
export function typedFor(draft: StartDraft, names: readonly string[], field: string): unknown {
  const { scheduleId, name, sizeUnits, placeId, areaM2 } = draft
  if (field.startsWith('pieces')) return [draft.count, names]
  if (field.startsWith('part')) return [scheduleId, draft.shape, draft.partRows]
  if (field.startsWith('order')) return [draft.orderName, draft.dueDay, draft.dueTime, draft.promiseAt]
  if (field === 'startsAt') return [draft.when, draft.day, draft.time]
  return { scheduleId, name, sizeUnits, placeId, areaM2 }[field]
}

/** What starts and dates are asked about: the batch as it is typed so far; null while something it rests on is missing. */
export function questionOf(draft: StartDraft, count: number, startsAt: number | null, zone: StudioZone): BatchToComeRequest | null {
  const { scheduleId, placeId } = draft
  if (scheduleId === null || scheduleId === 0 || placeId === null || count < 1 || startsAt === null) return null
  const dueAt = draft.dueDay === '' ? null : typedInstant(draft.dueDay, draft.dueTime || '17:00', zone)
  return { scheduleId, pieces: count, sizeUnits: draft.sizeUnits ?? 1, placeId, startsAt: new Date(startsAt).toISOString(), dueAt: dueAt === null ? null : new Date(dueAt).toISOString() }
}

/** What tells one such batch from another; the clock alone makes no new one. */
export function subjectOf(draft: StartDraft, count: number): { batch: string, start: string } {
  const batch = [draft.scheduleId, count, draft.sizeUnits, draft.placeId, draft.dueDay, draft.dueTime].join(' ')
  return { batch, start: [batch, draft.when, ...draft.when === 'other' ? [draft.day, draft.time] : []].join(' ') }
}
