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
    expect(problems({ steps: [{ ...a, material: 'cheese' }, b, c, d] })).toContain('step "a" asks for the material "cheese", which is not there')
    expect(problems({ steps: [a, { ...b, targets: [{ part: 'lid' }] }, c, d] })).toContain('step "b" names the part "lid", which is not there')
    expect(problems({ steps: [a, { ...b, targets: [{ part: 'panel', face: 'rim' }] }, c, d] })).toContain('step "b" names the face "rim", which panel has not')
    expect(problems({ links: [recoatable('a', 'b', 'out-of-clamps'), done('b', 'c'), done('c', 'd')] })).toContain('link a -> b: acrylic-gesso has no "out-of-clamps"')
  })

  it('names a window the material has not, and a milestone after bench work', () => {
    expect(problems({ links: [inWindow('a', 'b'), done('b', 'c'), done('c', 'd')] })).toContain('link a -> b: acrylic-gesso has no window')
    expect(problems({ links: [done('a', 'b'), recoatable('b', 'c'), done('c', 'd')] })).toContain('link b -> c: no material has no "ready-to-recoat"')
  })

  it('names steps that wait for each other, steps apart and steps in no order', () => {
    expect(problems({ links: [...plain.links, done('d', 'a')] })).toContain('some steps wait for each other')
    expect(problems({ links: [done('a', 'b'), done('c', 'd')] })).toContain('step "c" is not linked to the rest')
    expect(problems({ links: [done('a', 'b'), done('a', 'c'), done('c', 'd')] })).toContain('steps "b" and "c" are on the same part in no order')
    expect(problems({ links: [done('a', 'z')] })).toContain('link a -> z: a step is not there')
  })

  it('names parts that go nowhere or into themselves', () => {
    expect(problems({ parts: [...plain.parts, part('lid', 'Lid', null, {}, 'box')] })).toContain('part "lid" goes into "box", which is not a part')
    expect(problems({ parts: [part('panel', 'Panel', null, { front: 'Front' }, 'keys'), part('keys', 'Keys', null, {}, 'panel')] })).toContain('part "panel" goes into itself')
  })

  it('names a glue-up of one part, a clamp nobody opens, and what is there twice', () => {
    expect(problems({ steps: [a, b, c, { ...d, targets: [{ part: 'panel' }] }] })).toContain('step "d" joins fewer than two parts, or a face')
    expect(problems({ steps: [a, b, c, { ...d, releaseMin: 0 }] })).toContain('step "d" is held and nobody takes it out')
    expect(problems({ steps: [a, a, b, c, d] })).toContain('step "a" is there twice')
    expect(problems({ steps: [] })).toContain('there is no step')
  })
})

describe('the order of steps', () => {
  it('puts each after all it waits for', () => expect(stepOrder(plain)).toEqual(['a', 'b', 'c', 'd']))
  it('knows everything that follows', () => expect([...stepsAfter(plain, 'b')].sort()).toEqual(['c', 'd']))
})
