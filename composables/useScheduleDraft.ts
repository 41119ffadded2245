import { scheduleDraft } from '#shared/schemas/schedule-draft'
import type { ScheduleDraft } from '#shared/schemas/schedule-draft'

/** Where editing begins: an edition of a schedule, or a new one (`id` and `no` null) made from `origin`. */
export interface DraftStart { id: number | null, no: number | null, draft: ScheduleDraft, origin: string }

/** `base` is the edition the draft began from, so that what somebody else changed meanwhile can still be told. */
interface Kept { baseNo: number | null, base: ScheduleDraft, draft: ScheduleDraft }

/** What this device has kept of an edit, or null. Read with the schema: an old form of it must not break the page. */
function readKept(shelf: string): Kept | null {
  try {
    const kept: unknown = JSON.parse(localStorage.getItem(shelf) ?? 'null')
    if (typeof kept !== 'object' || kept === null || !('draft' in kept) || !('base' in kept) || !('baseNo' in kept)) return null
    const [draft, base] = [scheduleDraft.safeParse(kept.draft), scheduleDraft.safeParse(kept.base)]
    return draft.success && base.success && (typeof kept.baseNo === 'number' || kept.baseNo === null) ? { baseNo: kept.baseNo, base: base.data, draft: draft.data } : null
  }
  catch {
    return null
  }
}

/** An edit to go back from: the draft before it, what it was, and the field it typed into. */
interface Edit { draft: ScheduleDraft, what: string, field: string }

function keepOn(shelf: string, kept: Kept | null) {
  if (kept) localStorage.setItem(shelf, JSON.stringify(kept))
  else localStorage.removeItem(shelf)
}

const farBack = 100

/**
 * A finishing schedule while it is edited. Every edit gives a new draft, so that going back is taking the one before; each
 * is kept on this device at once, so that a reload, a closed page or a refusal loses nothing. It is kept here and not at
 * the studio since nobody else is served by half a schedule, and since it is kept where there is no network too.
 */
export function useScheduleDraft(start: DraftStart, studioId: number) {
  const shelf = `stillwet schedule ${studioId} ${start.id ?? start.origin}`
  const draft = shallowRef(start.draft)
  const baseNo = ref(start.no)
  const base = shallowRef(start.draft)
  const before = shallowRef<Edit[]>([])
  /** Whether this began with what an earlier visit left unsaved. */
  const resumed = ref(false)
  const changed = computed(() => JSON.stringify(draft.value) !== JSON.stringify(base.value))

  onMounted(() => {
    const kept = readKept(shelf)
    if (!kept || JSON.stringify(kept.draft) === JSON.stringify(start.draft)) return
    draft.value = kept.draft
    baseNo.value = kept.baseNo
    base.value = kept.base
    resumed.value = true
  })

  const keep = () => keepOn(shelf, changed.value ? { baseNo: baseNo.value, base: base.value, draft: draft.value } : null)

  /** Takes the next draft. `what` names the edit for going back; typing into one field is one edit. */
  function edit(next: ScheduleDraft, what: string, field = '') {
    if (next === draft.value) return
    const last = before.value.at(-1)
    if (field === '' || last?.field !== field) before.value = [...before.value.slice(1 - farBack), { draft: draft.value, what, field }]
    draft.value = next
    keep()
  }

  /** Goes back one edit; what it was, or null. */
  function undo(): string | null {
    const last = before.value.at(-1)
    if (!last) return null
    before.value = before.value.slice(0, -1)
    draft.value = last.draft
    keep()
    return last.what
  }

  /** Saved, or given up: this device forgets it. */
  const forget = () => keepOn(shelf, null)

  /** Leaves what was typed and begins again from what stands. */
  function leave() {
    draft.value = start.draft
    base.value = start.draft
    baseNo.value = start.no
    before.value = []
    resumed.value = false
    forget()
  }

  /** Goes on from an edition that came between: the draft stays and is saved on top of that one. */
  function rebase(no: number, standing: ScheduleDraft) {
    baseNo.value = no
    base.value = standing
    keep()
  }

  return { draft, baseNo, base, before, resumed, changed, edit, undo, forget, leave, rebase }
}
