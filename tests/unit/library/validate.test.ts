import { describe, expect, it } from 'vitest'
import { libraryMaterials } from '#shared/library/index'
import { coat, done, glueUp, inWindow, lightSanding, part, recoatable } from '#shared/library/schedules/build'
import { scheduleProblems, stepOrder, stepsAfter } from '#shared/library/validate'
import type { LibrarySchedule } from '#shared/library/types'

const plain: LibrarySchedule = {
  key: 'plain', name: 'Plain', summary: '',
  parts: [part('panel', 'Panel', 'back', { front: 'Front', back: 'Back' }), part('keys', 'Keys', null, {}, 'panel')],
  steps: [
    coat('a', 'A', 'acrylic-gesso', [5, 5], 'panel.front'), lightSanding('b', 'B', [5, 5], 'panel.front'), coat('c', 'C', 'water-polyurethane', [5, 5], 'panel.front'),
    glueUp('d', 'D', 'pva-white', [5, 5, 5, 2], 'panel keys', { hold: 'clamps' }),
  ],
  links: [recoatable('a', 'b', 'dry-to-sand-lightly'), done('b', 'c'), inWindow('c', 'd')],
}
const problems = (change: Partial<LibrarySchedule>) => scheduleProblems({ ...plain, ...change }, libraryMaterials)
const [a, b, c, d] = plain.steps
if (!a || !b || !c || !d) throw new Error('four steps are needed')

describe('what is wrong with a schedule', () => {
  it('is nothing when it is right', () => expect(problems({})).toEqual([]))

  it('names an unknown material, part, face and milestone', () => {
    expect(problems({ steps: [{ ...a, material: 'cheese' }, b, c, d] })).toContain('“A” asks for a material that the studio has not got.')
    expect(problems({ steps: [a, { ...b, targets: [{ part: 'lid' }] }, c, d] })).toContain('“B” names a part that is not there: lid.')
    expect(problems({ steps: [a, { ...b, targets: [{ part: 'panel', face: 'rim' }] }, c, d] })).toContain('“B” names a face that no part has: rim.')
    expect(problems({ links: [recoatable('a', 'b', 'out-of-clamps'), done('b', 'c'), done('c', 'd')] })).toContain('“B” waits until “A” is out of clamps, which its material never is.')
  })

  it('names a window the material has not, and a milestone after bench work', () => {
    expect(problems({ links: [inWindow('a', 'b'), done('b', 'c'), done('c', 'd')] })).toContain('“B” waits for a window after “A”, but Acrylic gesso has none.')
    expect(problems({ links: [done('a', 'b'), recoatable('b', 'c'), done('c', 'd')] })).toContain('“C” waits for a film, but “B” leaves none.')
  })

  it('names steps that wait for each other, steps apart and steps in no order', () => {
    expect(problems({ links: [...plain.links, done('d', 'a')] })).toContain('These wait for each other in a circle: “A”, “B”, “C”, “D”.')
    expect(problems({ links: [done('a', 'b'), done('c', 'd')] })).toEqual(['“B” and “C” are on the same face, and nothing says which comes first. It touches “A” and “D” too.'])
    expect(problems({ links: [done('a', 'b'), done('a', 'c'), done('c', 'd')] })).toEqual(['“B” and “C” are on the same face, and nothing says which comes first. It touches “D” too.'])
    expect(problems({ links: [done('a', 'z')] })).toContain('A wait names a step that is not there: z.')
  })

  it('names parts that go nowhere or into themselves', () => {
    expect(problems({ parts: [...plain.parts, part('lid', 'Lid', null, {}, 'box')] })).toContain('part "lid" goes into "box", which is not a part')
    expect(problems({ parts: [part('panel', 'Panel', null, { front: 'Front' }, 'keys'), part('keys', 'Keys', null, {}, 'panel')] })).toContain('part "panel" goes into itself')
  })

  it('names a glue-up of one part, a clamp nobody opens, and what is there twice', () => {
    expect(problems({ steps: [a, b, c, { ...d, targets: [{ part: 'panel' }] }] })).toContain('“D” joins fewer than two parts. Choose what is glued to what.')
    expect(problems({ steps: [a, b, c, { ...d, releaseMin: 0 }] })).toContain('“D” is held and nobody takes it out. Give the minutes for taking it out.')
    expect(problems({ steps: [a, a, b, c, d] })).toContain('The key a is there twice.')
    expect(problems({ steps: [] })).toContain('There is no step yet. Add the first.')
  })
})

describe('the order of steps', () => {
  it('puts each after all it waits for', () => expect(stepOrder(plain)).toEqual(['a', 'b', 'c', 'd']))
  it('knows everything that follows', () => expect([...stepsAfter(plain, 'b')].sort()).toEqual(['c', 'd']))
})
