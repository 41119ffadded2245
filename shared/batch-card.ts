import { briefCautions, briefDeferral } from '#shared/library/brief-cautions'
import { inGraphOrder } from '#shared/schedule-walk'
import type { BatchCardState } from '#shared/schemas/batch-card'
import type { ScheduleDetailWire, ScheduleStepWire } from '#shared/schemas/schedule'
import { checkText, linkText, restText, roundText, scheduleWords, windowText } from '#shared/words/schedules'
import { printWords } from '#shared/words/tags'

/** One attended act with its boxes: what it is, what is to be waited for before it, and what to mind. */
export interface CardRow { key: string, no: number | null, what: string, material: string | null, waits: string[], cautions: string | null }

const sentence = (text: string) => `${text.charAt(0).toUpperCase()}${text.slice(1)}.`

function waitsOf(step: ScheduleStepWire, { links, steps }: ScheduleDetailWire): string[] {
  const waits = links.filter(link => link.to === step.key).flatMap((link) => {
    const before = steps.find(each => each.key === link.from)
    const window = windowText(link)
    return before ? [linkText(link, before), ...window === null ? [] : [window]] : []
  })
  return waits.length === 0 ? [scheduleWords.first] : waits
}

/** The rows of one step: every coat of its round, every look meanwhile, and the taking out. */
function rowsOf(step: ScheduleStepWire, no: number, schedule: ScheduleDetailWire, keys: readonly string[]): CardRow[] {
  const times = step.perDay * step.days
  const cautions = keys.length === 0 ? null : [...briefCautions(keys), briefDeferral].map(each => `${each}.`).join(' ')
  const round = roundText(step)
  const rest = restText(step)
  const work = Array.from({ length: times }, (_, index): CardRow => ({
    key: `${step.key} ${index}`, no: index === 0 ? no : null, what: times === 1 ? step.name : `${step.name}, ${printWords.coatOf(index + 1, times)}`, material: step.material?.name ?? null,
    waits: index === 0 ? [...waitsOf(step, schedule), ...round === null ? [] : [sentence(round)]] : rest === null ? [] : [rest], cautions,
  }))
  const checks = step.checks.map((check): CardRow => ({ key: `${step.key} check ${check.afterMin}`, no: null, what: check.name, material: null, waits: [sentence(checkText(check))], cautions: null }))
  const out: CardRow[] = step.hold === null ? [] : [{ key: `${step.key} out`, no: null, what: printWords.takeOut, material: null, waits: rest === null ? [] : [rest], cautions: null }]
  return [...work, ...checks, ...out]
}

/** Every attended act of a batch in the order of its graph, a row each; eight empty rows where it has no schedule. */
export function cardRows({ schedule, stepCautions }: Pick<BatchCardState, 'schedule' | 'stepCautions'>): CardRow[] {
  if (!schedule) return Array.from({ length: 8 }, (_, index) => ({ key: `free ${index}`, no: index + 1, what: '', material: null, waits: [], cautions: null }))
  return inGraphOrder(schedule.steps, schedule.links).flatMap((step, index) => rowsOf(step, index + 1, schedule, stepCautions[step.key] ?? []))
}
