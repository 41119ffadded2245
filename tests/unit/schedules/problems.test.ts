import { describe, expect, it } from 'vitest'
import { librarySchedules } from '#shared/library/index'
import { scheduleProblems } from '#shared/schedules/problems'
import { reckonSchedule } from '#shared/schedules/reckon'
import { changeStep, removeLink, setLink } from '#shared/schedules/edit'
import { addPart } from '#shared/schedules/parts'
import type { ScheduleDraft } from '#shared/schemas/schedule-draft'
import { problemText } from '#shared/words/schedule-problems'
import { films, libraryOne, materialOf, on, panelWith, rules, sheets } from './drafts'

const found = (draft: ScheduleDraft) => scheduleProblems(draft, sheets, reckonSchedule(draft, sheets, films), rules).map(problem => `${problem.kind}: ${problemText(problem, draft)}`)
const link = (from: string, to: string) => ({ from, to, milestone: null, risk: 'p90' as const, windowed: false, recovery: null })
const two = (first: string, second: string) => panelWith({ key: 'a', name: 'A', kind: 'coat', with: first, targets: on('panel') }, { key: 'b', name: 'B', kind: 'coat', with: second, targets: on('panel') })

describe('what cannot be in a draft', () => {
  it.each(librarySchedules.map(schedule => schedule.key))('is nothing in %s, with times and rules too', (key) => {
    expect(found(libraryOne(key)).filter(text => text.startsWith('refused'))).toEqual([])
  })

  it('names all the steps of a circle, each once and in its order', () => {
    expect(found(setLink(two('acrylic-gesso', 'acrylic-gesso'), link('b', 'a')))).toContain('refused: These wait for each other in a circle: “A”, “B”.')
  })

  it('names a step that has no face left, and one whose material is missing', () => {
    const draft = two('acrylic-gesso', 'acrylic-gesso')
    expect(found(changeStep(draft, 'b', { targets: [] }, sheets))).toContain('refused: “B” works on no part. Choose its faces.')
    expect(found(changeStep(draft, 'b', { materialId: null }, sheets))).toContain('refused: “B” lays nothing. Choose its material.')
    expect(found({ ...draft, parts: [] })).toContain('refused: “A” names a part that is not there: panel.')
  })

  it('names a branch that never meets the rest', () => {
    const draft = addPart(two('acrylic-gesso', 'acrylic-gesso'), { name: 'Knob', meetsAt: null }, sheets)
    const loose = { ...draft, steps: [...draft.steps, { ...draft.steps[1]!, key: 'c', name: 'C', targets: on('knob') }] }
    expect(found(loose)).toEqual(['refused: “C” leads nowhere: nothing waits for it and it waits for nothing of the rest.'])
  })

  it('says one missing wait once, with all that it touches', () => {
    const draft = panelWith(...['a', 'b', 'c', 'd', 'e'].map(key => ({ key, name: key.toUpperCase(), kind: 'coat' as const, with: 'acrylic-gesso', targets: on('panel') })))
    const order = (given: ScheduleDraft) => found(given).filter(text => /first|nowhere/.test(text))
    expect(order(draft)).toEqual([])
    expect(order(removeLink(draft, 'b', 'c'))).toEqual(['refused: “B” and “C” are on the same face, and nothing says which comes first. It touches “A”, “D” and “E” too.'])
    // A step that lost both its waits wants both again.
    expect(order(setLink(removeLink(removeLink(draft, 'b', 'c'), 'c', 'd'), link('b', 'd')))).toEqual([
      'refused: “B” and “C” are on the same face, and nothing says which comes first. It touches “A” too.',
      'refused: “C” and “D” are on the same face, and nothing says which comes first. It touches “E” too.',
    ])
  })

  it('names a branch of several steps that never meets the rest once', () => {
    const draft = addPart(two('acrylic-gesso', 'acrylic-gesso'), { name: 'Knob', meetsAt: null }, sheets)
    const knob = ['c', 'd'].map(key => ({ ...draft.steps[1]!, key, name: key.toUpperCase(), targets: on('knob') }))
    expect(found({ ...draft, steps: [...draft.steps, ...knob], links: [...draft.links, link('c', 'd')] })).toEqual(['refused: “C” and “D” lead nowhere: nothing of the rest waits for them and they wait for nothing of it.'])
  })

  it('names a window that shuts before its wait is over, by what holds the step up itself', () => {
    // Spray enamel takes its next coat within an hour, or after two days. Without the second window a step that only
    // begins after seven hours of bench work on the first coat comes too late.
    const short = new Map([...sheets].map(([id, sheet]) => [id, { ...sheet, drying: { ...sheet.drying, windows: sheet.drying.windows.slice(0, 1) } }]))
    const first = { wait: films.wait.bind(films), windows: (step: Parameters<typeof films.windows>[0]) => films.windows(step).slice(0, 1) }
    const codes = (draft: ScheduleDraft) => scheduleProblems(draft, short, reckonSchedule(draft, short, first), rules).map(problem => `${problem.code} ${problem.step} ${problem.other}`)
    const draft = setLink(two('spray-enamel', 'spray-enamel'), { from: 'a', to: 'b', milestone: null, risk: 'p90', windowed: true, recovery: null })
    expect(codes(draft)).toEqual([])
    const work = { ...draft, steps: [...draft.steps, { ...draft.steps[0]!, key: 'w', name: 'W', kind: 'bench work' as const, materialId: null, pieceMin: 420 }] }
    expect(codes(setLink(setLink(work, link('a', 'w')), link('w', 'b')))).toContain('window shuts first b a')
    // Work that does not wait for the first coat can be done before it.
    expect(codes(setLink(work, link('w', 'b')))).not.toContain('window shuts first b a')
  })

  it('warns of a window narrower than its doubt, and does not refuse it', () => {
    // The slow size is at tack for a few hours, known to a few hours.
    expect(found(libraryOne('water-gilded-frame'))).toContain('caution: “Lay leaf on the sides, air still”: the window after “Slow oil size on the sides” is narrower than its doubt, so only a touch test finds it.')
  })

  it('refuses anything over wax, and warns of oil over a coat of gesso too soon', () => {
    expect(found(two('wax', 'shellac'))).toContain('refused: “B” cannot lie on “A”. Nothing sticks on top of wax.')
    const oil = found(two('acrylic-gesso', 'artists-oil'))
    expect(oil.filter(text => text.startsWith('refused'))).toEqual([])
    // Three days are 72 h.
    expect(oil).toContain('caution: “B” follows “A” sooner than 3 days. Under oil paint, acrylic gesso wants three days at least. Two weeks is better.')
  })

  it('warns of a round that does not fit into its day', () => {
    // Oil paint is not dry in a day, let alone twice.
    const draft = changeStep(panelWith({ key: 'a', name: 'A', kind: 'coat', with: 'artists-oil', targets: on('panel') }), 'a', { perDay: 3 }, sheets)
    expect(found(draft).join()).toContain('caution: “A” asks for more coats a day than dry in one')
    expect(materialOf('artists-oil')).toBeGreaterThan(0)
  })

  it('warns of a glue-up that takes longer than its glue can be worked, and of none without a figure', () => {
    // Yellow wood glue is open for 4 min at the least, and joined can be moved for 10 more.
    const frame = libraryOne('mitred-frame')
    const of = (pieceMin: number, own = sheets) => {
      const draft = changeStep(frame, 'glue-up', { pieceMin }, own)
      return scheduleProblems(draft, own, reckonSchedule(draft, own, films), rules).filter(each => each.code === 'open too short' && each.step === 'glue-up').map(each => `${each.kind}: ${problemText(each, draft)}`)
    }
    expect(of(15)).toEqual(['caution: “Glue up the frame” takes longer than its glue can be worked: Yellow wood glue (PVA, indoor), 14 min by its sheet. Spread only as much as is joined within that, have another pair of hands, or choose a glue that stays open longer.'])
    expect(of(14)).toEqual([])
    expect(of(15, new Map([...sheets].map(([id, sheet]) => [id, { ...sheet, workMin: null }])))).toEqual([])
    expect(of(15, new Map([...sheets].map(([id, sheet]) => [id, { ...sheet, workMin: 0.1 }])))[0]).toContain('less than a minute by its sheet')
  })

  it('says it of a step without a name too, and of nothing at all', () => {
    expect(found({ ...panelWith(), name: '' })).toEqual(['refused: Give the schedule a name.', 'refused: There is no step yet. Add the first.'])
    expect(found(changeStep(two('acrylic-gesso', 'acrylic-gesso'), 'a', { name: '' }, sheets))).toEqual(['refused: A step has no name.'])
  })
})
