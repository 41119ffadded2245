import { describe, expect, it } from 'vitest'
import { changeStep, copyStep, moveStep, removeStep, setLink } from '#shared/schedules/edit'
import { addPart, changePart } from '#shared/schedules/parts'
import { scheduleChanges } from '#shared/schedules/changes'
import type { ScheduleDraft } from '#shared/schemas/schedule-draft'
import { changeText } from '#shared/words/schedule-changes'
import { libraryOne, materialOf, on, panelWith, sheets } from './drafts'

const before = panelWith({ key: 'a', name: 'Ground', kind: 'coat', with: 'acrylic-gesso', targets: on('panel') }, { key: 's', name: 'Sand', kind: 'light sanding', targets: on('panel') }, { key: 'b', name: 'Varnish', kind: 'coat', with: 'water-polyurethane', targets: on('panel') })
const said = (after: ScheduleDraft) => scheduleChanges(before, after).map(changeText)

describe('what changed between two editions', () => {
  it('is nothing where nothing did', () => {
    expect(said(structuredClone(before))).toEqual([])
    expect(scheduleChanges(libraryOne('cased-book'), libraryOne('cased-book'))).toEqual([])
  })
  it('names the step and what of it', () => {
    expect(said(changeStep(before, 'a', { perDay: 2, pieceMin: 9 }, sheets))).toEqual(['Ground: how often, minutes'])
    // The sheet of the size has no "dry to sand lightly": what sanding waits for is proposed anew, and said.
    expect(said(changeStep(before, 'a', { materialId: materialOf('acrylic-size') }, sheets))).toEqual(['Ground: material', 'What “Sand” waits for after “Ground”'])
    expect(said(changeStep(before, 'a', { name: 'Seal', pieceMin: 9 }, sheets))).toEqual(['Ground is now Seal: minutes'])
  })
  it('says of a step that came or went so much, and not its waits again', () => {
    expect(said(removeStep(before, 's', sheets))).toEqual(['Step taken out: Sand', '“Varnish” waits for “Ground” now'])
    expect(said(copyStep(before, 'b', sheets).draft)).toEqual(['New step: Varnish, second time'])
  })
  it('names waits that were changed, and the order', () => {
    expect(said(setLink(before, { from: 'a', to: 's', milestone: 'dry-to-sand-flat', risk: 'p90', windowed: false, recovery: null }))).toEqual(['What “Sand” waits for after “Ground”'])
    expect(said(moveStep(before, 's', -1, sheets))).toEqual(['The order of the steps', '“Sand” waits for “Ground” no more', '“Varnish” waits for “Sand” no more', '“Varnish” waits for “Ground” now', '“Ground” waits for “Sand” now'])
  })
  it('names parts', () => {
    expect(said({ ...addPart(before, { name: 'Knob', meetsAt: null }, sheets), summary: 'x' })).toEqual(['What it is for', 'New part: Knob'])
    expect(said(changePart(before, 'panel', { grip: 'back' }))).toEqual(['Part changed: Panel'])
  })
})
