import { roomClock } from '#shared/drying/clock'
import { prepareMaterial } from '#shared/drying/material'
import { dryingTools } from '#shared/drying/tools'
import { libraryDraft, librarySheets } from '#shared/library/as-draft'
import { findLibrarySchedule, libraryMaterials } from '#shared/library/index'
import { systemRules } from '#shared/library/systems'
import type { SystemRuleWire } from '#shared/schemas/schedule'
import type { DraftStep, DraftTarget, ScheduleDraft } from '#shared/schemas/schedule-draft'
import { freshStep, insertStep } from '#shared/schedules/edit'
import { usualAir, UsualFilms } from '#shared/schedules/films'
import { emptyDraft } from '#shared/schedules/parts'

export const now = Date.parse('2026-04-07T10:00:00Z')
export const sheets = librarySheets(libraryMaterials)
const tools = dryingTools()
export const usual = { tempC: 20, rh: 0.5 }
export const films = new UsualFilms({ sheets: new Map([...sheets].map(([id, { drying }]) => [id, drying])), air: usualAir('UTC', usual), now, tools, prepare: sheet => prepareMaterial(sheet, tools) })
export const clock = roomClock(usualAir('UTC', usual), now, tools)

/** The number of a library material. */
export const materialOf = (key: string) => libraryMaterials.findIndex(each => each.key === key) + 1
const numbers = (keys: readonly string[]) => keys.map(materialOf)
export const rules: SystemRuleWire[] = systemRules.map(({ under, over, minMin, text }) => ({ under: numbers(under), over: numbers(over), minMin, text }))

export function libraryOne(key: string): ScheduleDraft {
  const found = findLibrarySchedule(key)
  if (!found) throw new Error(`There is no ${key}.`)
  return libraryDraft(found, libraryMaterials)
}

export const on = (text: string): DraftTarget[] => text.split(' ').map((word) => {
  const [part = '', face] = word.split('.')
  return { part, face: face ?? null }
})

/** A panel with two faces, and steps put in one after the other by the editor's own rules. */
export function panelWith(...given: (Pick<DraftStep, 'kind' | 'targets'> & Partial<DraftStep> & { with?: string })[]): ScheduleDraft {
  return given.reduce((draft, { with: key, ...step }) => insertStep(draft, freshStep(draft, { materialId: key === undefined ? null : materialOf(key), ...step }, sheets), draft.steps.length, sheets), emptyDraft('Panel', { name: 'Panel', faces: ['Front', 'Back'] }))
}

export const linkTexts = ({ links }: ScheduleDraft) => links.map(({ from, to, milestone, risk, windowed }) => `${from} > ${to}: ${milestone ?? 'done'} ${risk}${windowed ? ' window' : ''}`).sort()
