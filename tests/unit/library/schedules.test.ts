import { describe, expect, it } from 'vitest'
import { findLibraryMaterial, findLibrarySchedule, libraryMaterials, librarySchedules } from '#shared/library/index'
import { systemRules, systemRulesFor } from '#shared/library/systems'
import type { LibraryLink, LibraryMaterial, LibrarySchedule, LibraryStep } from '#shared/library/types'
import { scheduleProblems, stepOrder, stepsAfter } from '#shared/library/validate'

const stepOf = (schedule: LibrarySchedule, key: string) => schedule.steps.find(step => step.key === key)
const materialOf = (schedule: LibrarySchedule, key: string): LibraryMaterial | null => findLibraryMaterial(stepOf(schedule, key)?.material ?? '')

/** Minutes from a coat to what a link waits for, in the reference climate: the middle for likely, the sheet's high end else, a window's first opening. */
function restOf(schedule: LibrarySchedule, link: LibraryLink): number {
  const material = materialOf(schedule, link.from)
  const rung = material?.milestones.find(({ name }) => name === link.milestone)
  const opens = link.windowed ? material?.windows[0]?.from ?? 0 : 0
  return Math.max(opens, (link.risk === 'likely' ? rung?.typical : rung?.high) ?? 0)
}

/** The longest of all waits that lie between two steps. */
function between(schedule: LibrarySchedule, from: string, to: string): number {
  const at = new Map<string, number>([[from, 0]])
  for (const key of stepOrder(schedule) ?? []) {
    const reached = schedule.links.filter(link => link.to === key && at.has(link.from)).map(link => (at.get(link.from) ?? 0) + restOf(schedule, link))
    if (reached.length) at.set(key, Math.max(...reached))
  }
  return at.get(to) ?? -1
}

const faces = (step: LibraryStep) => step.targets.map(target => `${target.part}.${target.face ?? ''}`)
const share = (a: LibraryStep, b: LibraryStep) => faces(a).some(face => faces(b).includes(face))

/** Coats that lie directly on each other. */
function layers(schedule: LibrarySchedule): [LibraryStep, LibraryStep][] {
  const coats = schedule.steps.filter(step => step.kind === 'coat')
  return coats.flatMap(under => coats.filter((over) => {
    const after = stepsAfter(schedule, under.key)
    return share(under, over) && after.has(over.key) && !coats.some(mid => share(under, mid) && share(mid, over) && after.has(mid.key) && stepsAfter(schedule, mid.key).has(over.key))
  }).map(over => [under, over] as [LibraryStep, LibraryStep]))
}

describe('the finishing schedules of the library', () => {
  it('are at least the eleven of the trade, each once', () => {
    expect(librarySchedules.length).toBeGreaterThanOrEqual(11)
    expect(new Set(librarySchedules.map(s => s.key)).size).toBe(librarySchedules.length)
    expect(new Set(librarySchedules.map(s => s.name)).size).toBe(librarySchedules.length)
    expect(findLibrarySchedule('soup')).toBeNull()
  })

  describe.each(librarySchedules.map(s => [s.key, s] as const))('%s', (_key, schedule) => {
    it('has nothing wrong with it', () => expect(scheduleProblems(schedule, libraryMaterials)).toEqual([]))

    it('takes risks as they are: sanding by the middle, coats at nine in ten, straining at 98', () => {
      for (const link of schedule.links) {
        const name = `${link.from} -> ${link.to}`
        const to = stepOf(schedule, link.to)
        if (to?.kind === 'light sanding' && link.milestone === 'dry-to-sand-lightly') expect(link.risk, name).toBe('likely')
        if (to?.kind === 'coat' && link.milestone === 'ready-to-recoat') expect(link.risk, name).toBe('p90')
        // Strength is asked for before a joint is cut, bent or pressed; a coat on it only needs it still.
        if (link.milestone === 'full-strength' && to?.kind !== 'coat') expect(link.risk, name).toBe('p98')
        if (to?.kind === 'packing' && link.milestone) expect(link.risk, name).toBe('p98')
      }
    })

    it('waits for a milestone of every film that is sanded, turned or coated again', () => {
      for (const [under, over] of layers(schedule)) expect(between(schedule, under.key, over.key), `${under.key} -> ${over.key}`).toBeGreaterThan(0)
    })

    it('keeps the waits between unlike materials', () => {
      for (const [under, over] of layers(schedule)) {
        for (const rule of systemRulesFor(under.material ?? '', over.material ?? '')) {
          expect(rule.minMin, `${over.key} over ${under.key}: ${rule.name}`).not.toBeNull()
          expect(between(schedule, under.key, over.key), `${over.key} over ${under.key}: ${rule.name}`).toBeGreaterThanOrEqual(rule.minMin ?? Infinity)
        }
      }
    })

    it('asks for windows that can be met, doubt included', () => {
      for (const link of schedule.links.filter(link => link.windowed)) {
        // Opens at 1.378 of its figure and shuts at 0.726, as the ends are known to 25 %.
        const open = materialOf(schedule, link.from)?.windows.filter(w => Math.max((w.from ?? 0) * 1.378, restOf(schedule, link)) < (w.to ?? Infinity) * 0.726)
        expect(open?.length, `${link.from} -> ${link.to}`).toBeGreaterThan(0)
      }
      for (const step of schedule.steps.filter(step => step.days > 1)) {
        // From the last coat of one day to the first of the next may be a whole day.
        const ends = findLibraryMaterial(step.material ?? '')?.windows.map(w => (w.to ?? Infinity) * 0.726) ?? []
        for (const end of ends) expect(end, step.key).toBeGreaterThanOrEqual(1440)
      }
    })

    it('has a grip on every part that carries a film and hangs together at the end', () => {
      for (const step of schedule.steps.filter(step => step.kind === 'coat')) {
        for (const target of step.targets) expect(schedule.parts.find(part => part.key === target.part)?.grip, `${step.key} on ${target.part}`).toBeTruthy()
      }
      expect(schedule.parts.filter(part => part.into === undefined)).toHaveLength(1)
    })
  })

  it('let branches meet wherever there is more than one part', () => {
    for (const schedule of librarySchedules.filter(s => s.parts.length > 1)) {
      const meeting = schedule.steps.filter(step => schedule.links.filter(link => link.to === step.key).length > 1)
      expect(meeting.length, schedule.key).toBeGreaterThan(0)
    }
  })

  it('use the words of the trade: rounds, repeats, looks inside a rest, both faces, windows and holds', () => {
    const steps = librarySchedules.flatMap(s => s.steps)
    expect(steps.some(s => s.perDay > 1 && s.days > 1 && s.untilEnough)).toBe(true)
    expect(steps.some(s => s.checks.length === 3 && s.kind === 'glue-up')).toBe(true)
    expect(steps.filter(s => s.kind === 'turn over').length).toBeGreaterThan(2)
    expect(new Set(steps.flatMap(s => s.hold ?? []))).toEqual(new Set(['clamps', 'press', 'weight']))
    expect(new Set(steps.map(s => s.kind))).toEqual(new Set(['coat', 'glue-up', 'light sanding', 'flat sanding', 'levelling', 'turn over', 'bench work', 'packing']))
    expect(librarySchedules.filter(s => s.links.some(l => l.windowed)).length).toBeGreaterThan(5)
  })
})

describe('rules between materials', () => {
  it('name only materials that are there', () => {
    for (const rule of systemRules) {
      expect(rule.under.length).toBeGreaterThan(0)
      for (const key of [...rule.under, ...rule.over]) expect(findLibraryMaterial(key), `${rule.name}: ${key}`).not.toBeNull()
    }
  })

  it('let the longest wait hold', () => {
    // Oil paint on acrylic gesso is both "oil over water" (24 h) and "oil paint over gesso" (72 h).
    expect(systemRulesFor('acrylic-gesso', 'artists-oil').map(rule => rule.minMin).sort()).toEqual([1440, 4320])
  })
})
