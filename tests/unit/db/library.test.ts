import { and, count, eq, isNull } from 'drizzle-orm'
import { beforeEach, describe, expect, it } from 'vitest'
import { findLibraryMaterial, findLibrarySchedule, libraryMaterials, librarySchedules } from '#shared/library/index'
import * as tables from '../../../db/schema'
import { seedLibrary } from '../../../db/seed/library'
import { testDatabase } from '../../helpers/database'
import type { TestDatabase } from '../../helpers/database'

const { finishingSchedule, material, materialFigure, materialVersion, milestone, recoatWindow, scheduleCheck, scheduleFace, scheduleLink, schedulePart, scheduleStep, scheduleStepTarget, scheduleVersion, studio } = tables
const counted = [material, materialVersion, materialFigure, milestone, recoatWindow, finishingSchedule, scheduleVersion, schedulePart, scheduleFace, scheduleStep, scheduleStepTarget, scheduleLink, scheduleCheck]

let db: TestDatabase
let studioId: number
const makeStudio = () => db.insert(studio).values({ name: 'Quarry Lane', zone: 'Europe/London', madeAt: 0 }).returning().get().id
const rows = () => counted.map(table => db.select({ n: count() }).from(table).get()?.n)

beforeEach(() => {
  db = testDatabase()
  studioId = makeStudio()
})

describe('copying the library into a studio', () => {
  it('copies everything, and nothing the second time', () => {
    expect(seedLibrary(db, studioId)).toEqual({ materials: libraryMaterials.length, schedules: librarySchedules.length })
    const before = rows()
    const sum = (sizes: number[]) => sizes.reduce((a, b) => a + b, 0)
    expect(before).toEqual([
      libraryMaterials.length, libraryMaterials.length, sum(libraryMaterials.map(m => m.figures.length)), sum(libraryMaterials.map(m => m.milestones.length)), sum(libraryMaterials.map(m => m.windows.length)),
      librarySchedules.length, librarySchedules.length, sum(librarySchedules.map(s => s.parts.length)), sum(librarySchedules.flatMap(s => s.parts.map(p => p.faces.length))), sum(librarySchedules.map(s => s.steps.length)),
      sum(librarySchedules.flatMap(s => s.steps.map(step => step.targets.length))), sum(librarySchedules.map(s => s.links.length)), sum(librarySchedules.flatMap(s => s.steps.map(step => step.checks.length))),
    ])
    expect(seedLibrary(db, studioId)).toEqual({ materials: 0, schedules: 0 })
    expect(rows()).toEqual(before)
  })

  it('keeps the ladder, windows and figures as the library has them', () => {
    seedLibrary(db, studioId)
    const version = db.select({ id: materialVersion.id, cautions: materialVersion.cautions, film: materialVersion.film }).from(materialVersion)
      .innerJoin(material, eq(material.id, materialVersion.materialId)).where(eq(material.libraryKey, 'spray-enamel')).get()
    const from = findLibraryMaterial('spray-enamel')
    expect(version?.cautions).toEqual(from?.cautions)
    const ladder = db.select().from(milestone).where(eq(milestone.versionId, version?.id ?? 0)).orderBy(milestone.ordinal).all()
    expect(ladder.map(({ name, driver, low, typical, high, handTest, source, key }) => ({ name, driver, low, typical, high, handTest, source, key }))).toEqual(from?.milestones)
    const windows = db.select({ from: recoatWindow.fromMin, to: recoatWindow.toMin }).from(recoatWindow).where(eq(recoatWindow.versionId, version?.id ?? 0)).orderBy(recoatWindow.ordinal).all()
    expect(windows).toEqual([{ from: 0, to: 60 }, { from: 2880, to: null }])
  })

  it('keeps what rags, vapour and gloves hang on', () => {
    seedLibrary(db, studioId)
    const flags = ({ mustLieLevel, dryingOil, isocyanate, glovesUntil }: Pick<typeof materialVersion.$inferSelect, 'mustLieLevel' | 'dryingOil' | 'isocyanate' | 'glovesUntil'>) => [mustLieLevel, dryingOil, isocyanate, glovesUntil]
    const copied = db.select({ key: material.libraryKey, version: materialVersion }).from(materialVersion).innerJoin(material, eq(material.id, materialVersion.materialId)).all()
    expect(Object.fromEntries(copied.map(row => [row.key, flags(row.version)]))).toEqual(Object.fromEntries(libraryMaterials.map(each => [each.key, flags(each)])))
  })

  it('keeps the graph: links between the right steps, faces on the right parts', () => {
    seedLibrary(db, studioId)
    const version = db.select({ id: scheduleVersion.id, summary: scheduleVersion.summary }).from(scheduleVersion)
      .innerJoin(finishingSchedule, eq(finishingSchedule.id, scheduleVersion.scheduleId)).where(eq(finishingSchedule.libraryKey, 'resin-tray')).get()
    const from = findLibrarySchedule('resin-tray')
    expect(version?.summary).toBe(from?.summary)
    const steps = db.select().from(scheduleStep).where(eq(scheduleStep.versionId, version?.id ?? 0)).orderBy(scheduleStep.ordinal).all()
    expect(steps.map(step => step.key)).toEqual(from?.steps.map(step => step.key))
    const keyOf = new Map(steps.map(step => [step.id, step.key]))
    const links = db.select().from(scheduleLink).all().filter(link => keyOf.has(link.fromStepId))
    const text = (link: { milestone: string | null, risk: string, windowed: boolean }, a?: string, b?: string) => `${a} ${b} ${link.milestone} ${link.risk} ${link.windowed}`
    expect(links.map(link => text(link, keyOf.get(link.fromStepId), keyOf.get(link.toStepId))).sort()).toEqual(from?.links.map(link => text(link, link.from, link.to)).sort())
    const onAnyPart = db.select({ id: scheduleStepTarget.id }).from(scheduleStepTarget).innerJoin(scheduleFace, eq(scheduleFace.id, scheduleStepTarget.faceId)).all().length
    const onOwnPart = db.select({ id: scheduleStepTarget.id }).from(scheduleStepTarget).innerJoin(scheduleFace, and(eq(scheduleFace.id, scheduleStepTarget.faceId), eq(scheduleFace.partId, scheduleStepTarget.partId))).all().length
    expect(onOwnPart).toBe(onAnyPart)
    expect(onOwnPart).toBeGreaterThan(0)
  })

  it('leaves what the studio has alone, even a name of its own', () => {
    db.insert(material).values({ studioId, name: 'Acrylic gesso' }).run()
    seedLibrary(db, studioId)
    db.update(material).set({ name: 'Our shellac' }).where(eq(material.libraryKey, 'shellac')).run()
    expect(seedLibrary(db, studioId).materials).toBe(0)
    const named = (name: string) => db.select().from(material).where(eq(material.name, name)).all()
    expect(named('Acrylic gesso').map(row => row.libraryKey)).toEqual([null])
    expect(named('Acrylic gesso (library)').map(row => row.libraryKey)).toEqual(['acrylic-gesso'])
    expect(named('Our shellac')).toHaveLength(1)
  })

  it('serves a second studio by itself, and no studio not at all', () => {
    seedLibrary(db, studioId)
    const other = makeStudio()
    expect(seedLibrary(db, other).materials).toBe(libraryMaterials.length)
    expect(db.select({ n: count() }).from(material).where(eq(material.studioId, other)).get()?.n).toBe(libraryMaterials.length)
    const before = rows()
    expect(() => seedLibrary(db, other + 1)).toThrow(/FOREIGN KEY/)
    expect(rows()).toEqual(before)
    expect(db.select({ n: count() }).from(scheduleStep).where(and(eq(scheduleStep.kind, 'coat'), isNull(scheduleStep.materialId))).get()?.n).toBe(0)
  })

  it('runs inside a transaction and goes with it', () => {
    const undo = () => db.transaction((tx) => {
      seedLibrary(tx, studioId)
      tx.rollback()
    })
    expect(undo).toThrow()
    expect(rows().every(n => n === 0)).toBe(true)
  })
})
