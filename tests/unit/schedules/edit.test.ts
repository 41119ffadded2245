import { describe, expect, it } from 'vitest'
import { changeStep, copyStep, freeKey, freshStep, insertStep, moveStep, removeLink, removeStep, setLink } from '#shared/schedules/edit'
import { addFace, addPart, branchEnd, removeFace, removePart } from '#shared/schedules/parts'
import { draftProblems } from '#shared/schedules/problems'
import { librarySchedules } from '#shared/library/index'
import { libraryOne, linkTexts, materialOf, on, panelWith, sheets } from './drafts'

const gessoed = () => panelWith(
  { key: 'one', kind: 'coat', with: 'acrylic-gesso', targets: on('panel.front') },
  { key: 'sand', kind: 'light sanding', targets: on('panel.front') },
  { key: 'two', kind: 'coat', with: 'acrylic-gesso', targets: on('panel.front') },
)

describe('a step put in', () => {
  it('waits for what its own faces wait for: sanding for a film by the middle, a coat for sanding that is done', () => {
    expect(linkTexts(gessoed())).toEqual(['one > sand: dry-to-sand-lightly likely', 'sand > two: done p90'])
  })

  it('goes through the window of a varnish where the sheet has one', () => {
    const draft = panelWith({ key: 'a', kind: 'coat', with: 'water-polyurethane', targets: on('panel.front') }, { key: 'b', kind: 'coat', with: 'water-polyurethane', targets: on('panel.front') })
    expect(linkTexts(draft)).toEqual(['a > b: ready-to-recoat p90 window'])
  })

  it('waits for nothing on another face, and for both where it covers both', () => {
    const draft = panelWith({ key: 'f', kind: 'coat', with: 'acrylic-gesso', targets: on('panel.front') }, { key: 'b', kind: 'coat', with: 'acrylic-gesso', targets: on('panel.back') }, { key: 'all', kind: 'coat', with: 'acrylic-gesso', targets: on('panel') })
    expect(linkTexts(draft)).toEqual(['b > all: ready-to-recoat p90', 'f > all: ready-to-recoat p90'])
  })

  it('keeps the wait on the face that it leaves out', () => {
    // Both faces, then the front alone, then both: the third still waits for the first coat's back.
    const draft = panelWith({ key: 'a', kind: 'coat', with: 'acrylic-gesso', targets: on('panel') }, { key: 'b', kind: 'coat', with: 'acrylic-gesso', targets: on('panel') })
    const { draft: copied } = copyStep(draft, 'a', sheets)
    const front = changeStep(copied, 'acrylic-gesso-third-time', { targets: on('panel.front') }, sheets)
    expect(linkTexts(front)).toEqual(['a > acrylic-gesso-third-time: ready-to-recoat p90', 'a > b: ready-to-recoat p90', 'acrylic-gesso-third-time > b: ready-to-recoat p90'])
  })

  it('is told apart by name from its like', () => {
    expect(gessoed().steps.map(step => step.name)).toEqual(['Acrylic gesso', 'Sand lightly', 'Acrylic gesso, second time'])
  })
})

describe('a step taken out, moved and copied', () => {
  it('lets what waited for it wait for what it waited for', () => {
    expect(linkTexts(removeStep(gessoed(), 'sand', sheets))).toEqual(['one > two: ready-to-recoat p90'])
  })

  it('comes back as it was when moved there and back, changed waits and all', () => {
    const changed = setLink(gessoed(), { from: 'one', to: 'sand', milestone: 'dry-to-sand-flat', risk: 'p98', windowed: false, recovery: null })
    const moved = moveStep(changed, 'two', -2, sheets)
    expect(moved.steps.map(step => step.key)).toEqual(['two', 'one', 'sand'])
    expect(linkTexts(moved)).toEqual(['one > sand: dry-to-sand-flat p98', 'two > one: ready-to-recoat p90'])
    expect(linkTexts(moveStep(moved, 'two', 2, sheets))).toEqual(linkTexts(changed))
  })

  it('does not go past the ends', () => {
    const draft = gessoed()
    expect(moveStep(draft, 'one', -1, sheets)).toBe(draft)
    expect(moveStep(draft, 'two', 5, sheets)).toBe(draft)
  })

  it('keeps a wait between unlike faces that somebody made', () => {
    const draft = panelWith({ key: 'f', kind: 'coat', with: 'acrylic-gesso', targets: on('panel.front') }, { key: 'x', kind: 'bench work', targets: on('panel.front') }, { key: 'b', kind: 'coat', with: 'acrylic-gesso', targets: on('panel.back') })
    const tied = setLink(draft, { from: 'f', to: 'b', milestone: 'dry-to-handle', risk: 'p90', windowed: false, recovery: null })
    expect(linkTexts(moveStep(tied, 'b', -1, sheets))).toContain('f > b: dry-to-handle p90')
    expect(linkTexts(removeLink(tied, 'f', 'b'))).toEqual(linkTexts(draft))
  })

  it.each(librarySchedules.map(schedule => schedule.key))('leaves %s whole, whichever step is moved, copied, or taken out', (key) => {
    const draft = libraryOne(key)
    const names = (code: string) => code !== 'apart' && code !== 'no step'
    for (const step of draft.steps) {
      for (const edited of [moveStep(draft, step.key, 1, sheets), moveStep(draft, step.key, -1, sheets), copyStep(draft, step.key, sheets).draft, removeStep(draft, step.key, sheets)]) {
        expect(draftProblems(edited, sheets).filter(problem => names(problem.code)), `${key} ${step.key}`).toEqual([])
      }
    }
  })
})

describe('a step changed', () => {
  it('takes a new name with its new material until somebody has named it', () => {
    const draft = changeStep(gessoed(), 'one', { materialId: materialOf('acrylic-size') }, sheets)
    expect(draft.steps[0]?.name).toBe(sheets.get(materialOf('acrylic-size'))?.name)
    const named = changeStep(changeStep(gessoed(), 'one', { name: 'Seal it' }, sheets), 'one', { materialId: materialOf('shellac') }, sheets)
    expect(named.steps[0]?.name).toBe('Seal it')
  })

  it('proposes anew a wait that its new material has not got', () => {
    const draft = changeStep(gessoed(), 'one', { materialId: materialOf('artists-oil') }, sheets)
    expect(draftProblems(draft, sheets)).toEqual([])
  })

  it('of another kind lays nothing and waits by its own risk', () => {
    const draft = changeStep(gessoed(), 'two', { kind: 'flat sanding' }, sheets)
    expect(draft.steps[2]).toMatchObject({ kind: 'flat sanding', materialId: null, hold: null })
    expect(draftProblems(draft, sheets)).toEqual([])
  })
})

describe('the dust of a step', () => {
  it('is the usual one of its kind, as what a mishap puts in says too', () => {
    const made = (kind: 'light sanding' | 'flat sanding' | 'levelling' | 'coat') => freshStep(gessoed(), { kind, materialId: null, targets: on('panel') }, sheets).dust
    expect([made('light sanding'), made('flat sanding'), made('levelling'), made('coat')]).toEqual(['some', 'much', 'some', 'none'])
  })

  it('goes with a new kind while nobody has said another', () => {
    const kinds = (draft: ReturnType<typeof gessoed>) => changeStep(draft, 'two', { kind: 'levelling' }, sheets).steps[2]?.dust
    expect(kinds(gessoed())).toBe('some')
    expect(kinds(changeStep(gessoed(), 'two', { dust: 'much' }, sheets))).toBe('much')
  })
})

describe('parts and faces', () => {
  it('meet where a step joins them: a new part with its meeting step has a branch of its own', () => {
    const draft = panelWith({ key: 'a', kind: 'coat', with: 'acrylic-gesso', targets: on('panel') }, { key: 'fit', kind: 'bench work', targets: on('panel') })
    const joined = addPart(draft, { name: 'Knob', meetsAt: 'fit' }, sheets)
    expect(joined.steps[1]?.targets).toEqual(on('panel knob'))
    expect(linkTexts(joined)).toEqual(linkTexts(draft))
  })

  it('have steps of a branch before the step where they meet', () => {
    const draft = addPart(panelWith({ key: 'a', kind: 'coat', with: 'acrylic-gesso', targets: on('panel') }, { key: 'fit', kind: 'bench work', targets: on('panel') }), { name: 'Knob', meetsAt: 'fit' }, sheets)
    expect(branchEnd(draft, 'knob')).toBe(1)
    const turned = insertStep(draft, freshStep(draft, { key: 'turn', kind: 'bench work', materialId: null, targets: on('knob') }, sheets), 1, sheets)
    expect(linkTexts(turned)).toContain('turn > fit: done p90')
    expect(branchEnd(turned, 'knob')).toBe(2)
    expect(branchEnd(addPart(turned, { name: 'Screw', meetsAt: null }, sheets), 'screw')).toBe(3)
    expect(draftProblems(turned, sheets)).toEqual([])
  })

  it('go with the steps that worked on nothing else', () => {
    const draft = panelWith({ key: 'f', kind: 'coat', with: 'acrylic-gesso', targets: on('panel.front') }, { key: 'b', kind: 'coat', with: 'acrylic-gesso', targets: on('panel.back') }, { key: 'both', kind: 'coat', with: 'acrylic-gesso', targets: on('panel.front panel.back') })
    const frontOnly = removeFace(draft, 'panel', 'back', sheets)
    expect(frontOnly.steps.map(step => step.key)).toEqual(['f', 'both'])
    expect(frontOnly.steps[1]?.targets).toEqual(on('panel.front'))
    expect(linkTexts(frontOnly)).toEqual(['f > both: ready-to-recoat p90'])
    expect(removePart(draft, 'panel', sheets)).toMatchObject({ parts: [], steps: [], links: [] })
  })

  it('get keys that nobody has', () => {
    expect(freeKey('Zweite Fläche!', [])).toBe('zweite-fla-che')
    expect(freeKey('Edges', ['edges', 'edges-2'])).toBe('edges-3')
    expect(freeKey('???', [])).toBe('item')
    expect(addFace(panelWith(), 'panel', 'Front').parts[0]?.faces.map(face => face.key)).toEqual(['front', 'back', 'front-2'])
  })
})
