import type { InjectionKey } from 'vue'
import { prepareMaterial } from '#shared/drying/material'
import { dryingTools } from '#shared/drying/tools'
import type { MemberWire } from '#shared/schemas/member'
import type { ScheduleMaterialsWire } from '#shared/schemas/schedule'
import type { DraftLink, DraftStep, ScheduleDraft } from '#shared/schemas/schedule-draft'
import { changeStep, copyStep, freshStep, insertStep, moveStep, removeLink, removeStep, setLink } from '#shared/schedules/edit'
import { usualAir, UsualFilms } from '#shared/schedules/films'
import { scheduleProblems } from '#shared/schedules/problems'
import { reckonSchedule } from '#shared/schedules/reckon'
import type { DraftStart } from '~/composables/useScheduleDraft'
import { editorWords } from '#shared/words/schedule-editor'

/** Reckons drafts in this browser with the model that every other time comes from; null until its tables are made. */
function useFilms(known: ScheduleMaterialsWire) {
  const films = shallowRef<UsualFilms | null>(null)
  onMounted(() => setTimeout(() => {
    const tools = dryingTools()
    films.value = new UsualFilms({ sheets: new Map(known.materials.map(each => [each.id, each.drying])), air: usualAir(known.zone, known.usual), now: Date.now(), tools, prepare: sheet => prepareMaterial(sheet, tools) })
  }))
  return films
}

function makeEditor(start: DraftStart, studioId: number, known: ScheduleMaterialsWire, members: readonly MemberWire[]) {
  const kept = useScheduleDraft(start, studioId)
  const { draft, edit } = kept
  const sheets = new Map(known.materials.map(each => [each.id, each]))
  const films = useFilms(known)
  const reckoned = computed(() => (films.value ? reckonSchedule(draft.value, sheets, films.value) : null))
  const problems = computed(() => (reckoned.value ? scheduleProblems(draft.value, sheets, reckoned.value, known.rules) : []))
  const refused = computed(() => problems.value.filter(problem => problem.kind === 'refused'))
  /** The step that is open for changing; one at a time, so that the list stays a list. */
  const open = ref<string | null>(null)
  /** Fields with a figure typed that cannot be, each with the way to it; the draft has the figure from before. */
  const wrongFields = reactive(new Map<string, () => void>())
  /** Said aloud after an edit that moves things about. */
  const said = ref('')
  const nameOf = (key: string) => draft.value.steps.find(step => step.key === key)?.name || editorWords.nameless

  function tell(next: ScheduleDraft, what: string, field = '') {
    edit(next, what, field)
    if (field === '') said.value = what
  }

  const acts = {
    change: (key: string, patch: Partial<DraftStep>, field: string) => tell(changeStep(draft.value, key, patch, sheets), editorWords.changed(nameOf(key)), `${key} ${field}`),
    add: (given: Pick<DraftStep, 'kind' | 'materialId' | 'targets'> & Partial<DraftStep>, at: number) => {
      const step = freshStep(draft.value, given, sheets)
      tell(insertStep(draft.value, step, at, sheets), editorWords.added(step.name))
      return step.key
    },
    move: (key: string, by: -1 | 1) => tell(moveStep(draft.value, key, by, sheets), editorWords.moved(nameOf(key), by)),
    copy: (key: string) => {
      const made = copyStep(draft.value, key, sheets)
      tell(made.draft, editorWords.copied(nameOf(key)))
      open.value = made.key
    },
    remove: (key: string) => {
      tell(removeStep(draft.value, key, sheets), editorWords.removed(nameOf(key)))
      if (open.value === key) open.value = null
    },
    link: (link: DraftLink) => tell(setLink(draft.value, link), editorWords.waitChanged(nameOf(link.to))),
    unlink: (from: string, to: string) => tell(removeLink(draft.value, from, to), editorWords.waitGone(nameOf(to))),
    undo: () => {
      const what = kept.undo()
      if (what !== null) said.value = editorWords.undone(what)
    },
  }

  return { ...kept, ...acts, tell, sheets, known, members, reckoned, problems, refused, open, wrongFields, said, nameOf, id: start.id }
}

export type ScheduleEditor = ReturnType<typeof makeEditor>
const editorKey: InjectionKey<ScheduleEditor> = Symbol('schedule editor')

/** Makes the editor of a page for the components below it. */
export function provideScheduleEditor(start: DraftStart, studioId: number, known: ScheduleMaterialsWire, members: readonly MemberWire[]): ScheduleEditor {
  const editor = makeEditor(start, studioId, known, members)
  provide(editorKey, editor)
  return editor
}

/** The editor of the page; only for components inside one. */
export function useScheduleEditor(): ScheduleEditor {
  const editor = inject(editorKey)
  if (!editor) throw new Error('There is no schedule being edited here.')
  return editor
}
