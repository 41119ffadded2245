import { and, eq } from 'drizzle-orm'
import { describe, expect, it } from 'vitest'
import { coat, material, materialVersion, pieceStep, prediction, studio, tin, touchTest } from '~~/db/schema'
import { recordAct } from '~~/server/services/acts'
import { startBatch } from '~~/server/services/batches'
import { learnedPart, resetLearned } from '~~/server/services/learned'
import { listEditions, newestRow, partsOfEdition, readEditions } from '~~/server/services/material-editions'
import { createMaterial, goBack, patchMaterial, saveEdition } from '~~/server/services/material-sheets'
import { listMaterials, materialSheet } from '~~/server/services/materials'
import { changeParts, createMix } from '~~/server/services/mixes'
import { pieceStates } from '~~/server/services/piece-states'
import { recentMaterials } from '~~/server/services/recent-materials'
import { vapourState } from '~~/server/services/vapour'
import { dryingMaterials } from '~~/server/work/materials'
import { foldPieces } from '~~/server/work/refold'
import { typedText } from '#shared/data-sheet/typed-text'
import type { DataSheetBody, EditionBody } from '#shared/schemas/material-edit'
import { contentsOf } from '#shared/library/required-cautions'
import { figureNames } from '#shared/library/types'
import { mixRefusals } from '#shared/words/mixes'
import { sheetRefusals } from '#shared/words/data-sheet'
import { hour, testStudio } from '../../../helpers/studio'

const now = Date.parse('2026-04-07T10:00:00Z')
const sheet = (name: string, more: Partial<DataSheetBody> = {}): DataSheetBody => ({ name, kind: 'varnish', hardening: 'water', solvent: null, contents: [], mustLieLevel: false, gloves: false, hazards: '', figures: { 'ready-to-recoat': '2-4 h', 'reference temperature': '20' }, ...more })

function workshop() {
  const base = testStudio(now)
  const { db, studioId, members } = base
  const owner = db.select().from(studio).where(eq(studio.id, studioId)).get()!
  const idOf = (key: string) => db.select().from(material).where(and(eq(material.studioId, studioId), eq(material.libraryKey, key))).get()?.id ?? 0
  const ok = <T>(answer: T): Extract<T, { ok: true }> => {
    if (typeof answer === 'object' && answer !== null && 'ok' in answer && answer.ok === true) return answer as Extract<T, { ok: true }>
    throw new Error(JSON.stringify(answer))
  }
  /** The form as it is filled from the newest edition, with one rung's usual typed over. */
  const typedOver = (materialId: number, rung: string, usual: string): EditionBody => {
    const version = newestRow(db, studioId, materialId)!
    const edition = readEditions(db, studioId, [version]).get(version.id)!
    const time = (minutes: number) => typedText(minutes, 'time', 'metric')
    return {
      basedOn: version.no, note: 'our own bench', solvent: edition.solvent as 'water', contents: contentsOf(edition), mustLieLevel: edition.mustLieLevel, gloves: false, hazards: '', windows: [], figures: [],
      rungs: edition.rungs.map(each => ({ name: each.name, low: each.name === rung ? '' : time(each.low), typical: each.name === rung ? usual : time(each.typical), high: each.name === rung ? '' : time(each.high), source: each.source, key: each.key })),
    }
  }
  const save = (materialId: number, rung: string, usual: string) => ok(saveEdition(db, owner, members.maker, materialId, typedOver(materialId, rung, usual), now))
  let keys = 0
  const tell = (pieceId: number, kind: 'coat on' | 'touch test', body: Record<string, unknown>, at = now) =>
    ok(recordAct(db, studioId, { member: members.maker }, { clientKey: `edition-test-${++keys}`, kind, doneAt: new Date(at).toISOString(), pieces: pieceStates(db, studioId, [pieceId]).map(each => ({ id: each.id, version: each.version })), body }, at))
  const start = (schedule: string) => ok(startBatch(db, studioId, { member: members.maker }, { clientKey: `edition-start-${++keys}`, name: `Boxes ${keys}`, scheduleId: base.scheduleOf(schedule), pieces: ['Box 1'], sizeUnits: 1, placeId: base.places.shelf, order: null, startsAt: new Date(now - hour).toISOString(), oldObject: false }, now)).pieceIds[0] ?? 0
  return { ...base, owner, idOf, ok, typedOver, save, tell, start }
}

describe('a new edition', () => {
  it('is what coats from then on are put on with; a coat that lies keeps its own', () => {
    const { db, studioId, materialOf, idOf, save, tell, start } = workshop()
    const first = materialOf('acrylic-gesso')
    const pieceId = start('made-over-cover')
    const gessoed = () => db.select().from(pieceStep).where(and(eq(pieceStep.pieceId, pieceId), eq(pieceStep.kind, 'coat'))).all().filter(step => step.materialVersionId !== null)
    const [ground, next] = gessoed().filter(each => each.materialVersionId === first)
    tell(pieceId, 'coat on', { step: ground?.key }, now - hour / 2)
    const before = db.select().from(prediction).all()
    save(idOf('acrylic-gesso'), 'ready-to-recoat', '3 h')
    const second = newestRow(db, studioId, idOf('acrylic-gesso'))!.id
    expect(db.select().from(coat).all().map(each => each.materialVersionId)).toEqual([first])
    expect(db.select().from(prediction).all()).toEqual(before)
    tell(pieceId, 'coat on', { step: next?.key })
    expect(db.select().from(coat).all().map(each => each.materialVersionId)).toEqual([first, second])
    // What a later fold makes of the piece's acts is what its rows say.
    const [folded] = foldPieces(db, studioId, [pieceId])
    expect(folded?.folded.coats.map(each => each.materialVersionId)).toEqual([first, second])
    expect(folded?.folded.steps.map(each => each.materialVersionId)).toEqual(db.select().from(pieceStep).where(eq(pieceStep.pieceId, pieceId)).all().sort((a, b) => a.ordinal - b.ordinal).map(each => each.materialVersionId))
  })

  it('goes on with what touch tests have taught, and with what was forgotten', () => {
    const { db, studioId, members, idOf, save, tell, start, materialOf } = workshop()
    const materialId = idOf('acrylic-gesso')
    const pieceId = start('made-over-cover')
    const step = db.select().from(pieceStep).where(eq(pieceStep.pieceId, pieceId)).all().find(each => each.materialVersionId === materialOf('acrylic-gesso'))!
    tell(pieceId, 'coat on', { step: step.key }, now - 2 * hour)
    tell(pieceId, 'touch test', { milestone: 'ready-to-recoat', reached: true })
    expect(db.select().from(touchTest).all()).toHaveLength(1)
    save(materialId, 'cured', '20 d')
    expect(learnedPart(db, studioId, materialId, now)).toMatchObject({ tests: 1 })
    resetLearned(db, studioId, members.maker, materialId, true, now + hour)
    save(materialId, 'cured', '21 d')
    expect(learnedPart(db, studioId, materialId, now)).toMatchObject({ tests: 0, resetAt: new Date(now + hour).toISOString() })
    expect(db.select().from(tin).all()).toEqual([])
  })

  it('says what changed and who did it, and going back takes the old figures up again', () => {
    const { db, studioId, members, idOf, save, ok } = workshop()
    const materialId = idOf('shellac')
    expect(materialSheet(db, studioId, materialId, true)).toMatchObject({ own: false, starter: true, edition: 1 })
    save(materialId, 'ready-to-recoat', '2 h')
    expect(materialSheet(db, studioId, materialId, true)).toMatchObject({ own: true, edition: 2 })
    const [newest, first] = listEditions(db, studioId, materialId, true, 'metric') as { no: number, by: string | null, note: string, changes: string[] }[]
    expect(newest).toMatchObject({ no: 2, by: 'The maker', note: 'our own bench' })
    expect(newest?.changes[0]).toContain('ready to recoat: 2 h')
    expect(first).toMatchObject({ no: 1, by: null })
    ok(goBack(db, studioId, members.maker, materialId, 1, 2, now))
    const versions = db.select().from(materialVersion).where(eq(materialVersion.materialId, materialId)).all()
    const editions = readEditions(db, studioId, versions)
    expect(editions.get(versions[2]!.id)).toEqual(editions.get(versions[0]!.id))
    expect(goBack(db, studioId, members.maker, materialId, 3, 3, now)).toMatchObject({ message: sheetRefusals.sameEdition })
    expect(goBack(db, studioId, members.maker, materialId, 9, 3, now)).toMatchObject({ reason: 'absent' })
  })

  it('is refused when somebody else was first, or nothing changed', () => {
    const { db, owner, members, idOf, typedOver, save } = workshop()
    const materialId = idOf('shellac')
    const mine = typedOver(materialId, 'ready-to-recoat', '2 h')
    save(materialId, 'ready-to-recoat', '3 h')
    expect(saveEdition(db, owner, members.maker, materialId, mine, now)).toMatchObject({ reason: 'conflict', message: sheetRefusals.edition(2) })
  })

  it('loses none of the starter library’s cautions', () => {
    const { db, studioId, owner, members, idOf, typedOver, ok } = workshop()
    const materialId = idOf('epoxy-coating')
    const before = newestRow(db, studioId, materialId)!.cautions
    ok(saveEdition(db, owner, members.maker, materialId, { ...typedOver(materialId, 'cured', '6 d'), contents: ['other hardener'] }, now))
    expect(newestRow(db, studioId, materialId)!.cautions).toEqual(expect.arrayContaining(before))
  })
})

describe('a material of the studio’s own', () => {
  it('has a name of its own, and is put away only when no schedule asks for it', () => {
    const { db, studioId, owner, members, idOf, ok } = workshop()
    const made = ok(createMaterial(db, owner, members.maker, sheet('Hall varnish', { hazards: 'Stings the eyes.' }), now))
    expect(materialSheet(db, studioId, made.id, true)).toMatchObject({ own: true, starter: false, hazards: 'Stings the eyes.' })
    expect(createMaterial(db, owner, members.maker, sheet('HALL varnish'), now)).toMatchObject({ fields: { name: sheetRefusals.nameTaken } })
    expect(patchMaterial(db, studioId, members.maker, idOf('acrylic-gesso'), { putAway: true }, now)).toMatchObject({ reason: 'impossible' })
    expect(patchMaterial(db, studioId, members.maker, made.id, { putAway: true }, now)).toEqual({ ok: true })
    expect(listMaterials(db, studioId, true).some(each => each.id === made.id)).toBe(false)
    expect(listMaterials(db, studioId, true, true).map(each => each.id)).toEqual([made.id])
  })
})

describe('a mix', () => {
  const mixed = () => {
    const studioWith = workshop()
    const { db, studioId, owner, members, idOf, ok } = studioWith
    const secret = ok(createMaterial(db, owner, members.maker, sheet('Grandmother oil', { kind: 'oil', hardening: 'oil', solvent: 'mineral spirits' }), now)).id
    const made = ok(createMix(db, studioId, members.maker, { name: 'House varnish', basis: 'weight', parts: [{ materialId: idOf('oil-polyurethane'), parts: 3, private: false }, { materialId: secret, parts: 1, private: true }] }, now))
    return { ...studioWith, secret, mixId: made.id }
  }

  it('carries every caution of its parts and is reckoned with more doubt', () => {
    const { db, studioId, mixId, idOf, secret } = mixed()
    const own = newestRow(db, studioId, mixId)!
    for (const id of [idOf('oil-polyurethane'), secret]) expect(own.cautions).toEqual(expect.arrayContaining(newestRow(db, studioId, id)!.cautions))
    expect(dryingMaterials(db, studioId, [own.id]).get(own.id)?.mixed).toBe(true)
    expect(dryingMaterials(db, studioId, [newestRow(db, studioId, secret)!.id]).get(newestRow(db, studioId, secret)!.id)?.mixed).toBeUndefined()
  })

  it('can be put on like any material', () => {
    const { db, studioId, mixId, start, tell } = mixed()
    const pieceId = start('made-over-cover')
    const version = newestRow(db, studioId, mixId)!.id
    expect(recentMaterials(db, studioId, false).others.some(each => each.versionId === version)).toBe(true)
    expect(() => tell(pieceId, 'coat on', { step: null, materialVersionId: version, name: 'House varnish' })).toThrow('flames')
  })

  it('hides a private part from who may not see it, by name and as a material', () => {
    const { db, studioId, members, mixId, secret } = mixed()
    expect(materialSheet(db, studioId, mixId, true)).toMatchObject({ basis: 'weight', hiddenParts: 0, parts: [{ parts: 3, private: false }, { name: 'Grandmother oil', parts: 1, private: true }] })
    const seen = [materialSheet(db, studioId, mixId, false), listMaterials(db, studioId, false), recentMaterials(db, studioId, false), listEditions(db, studioId, mixId, false, 'metric'), vapourState(db, studioId, members.helper, now), learnedPart(db, studioId, secret, now, false), materialSheet(db, studioId, secret, false)]
    expect(JSON.stringify(seen)).not.toContain('Grandmother')
    expect(materialSheet(db, studioId, mixId, false)).toMatchObject({ hiddenParts: 1 })
    expect(materialSheet(db, studioId, secret, false)).toMatchObject({ reason: 'absent' })
    expect(JSON.stringify(vapourState(db, studioId, members.maker, now))).toContain('Grandmother')
    // Who guesses its number cannot bring it to light either.
    const refused = recordAct(db, studioId, { member: { ...members.helper, stepKinds: ['coat'] } }, { clientKey: 'guess-the-number', kind: 'coat on', doneAt: new Date(now).toISOString(), pieces: [], body: { step: null, materialVersionId: newestRow(db, studioId, secret)!.id, name: 'x' } }, now)
    expect(refused).toMatchObject({ ok: false, fields: { materialVersionId: expect.any(String) as string } })
  })

  it('gets other parts as a new edition, and its old ones back with the old edition', () => {
    const { db, studioId, members, mixId, secret, idOf, ok } = mixed()
    ok(changeParts(db, studioId, members.maker, mixId, { basedOn: 1, basis: 'volume', parts: [{ materialId: idOf('oil-polyurethane'), parts: 5, private: false }, { materialId: secret, parts: 1, private: true }] }, now))
    expect(partsOfEdition(db, studioId, newestRow(db, studioId, mixId)!.id)).toMatchObject({ basis: 'volume', parts: [{ parts: 5 }, { parts: 1 }] })
    ok(goBack(db, studioId, members.maker, mixId, 1, 2, now))
    expect(partsOfEdition(db, studioId, newestRow(db, studioId, mixId)!.id)).toMatchObject({ basis: 'weight', parts: [{ parts: 3 }, { parts: 1 }] })
  })

  it('is refused in a circle, with a part twice, of finishes and glues, and of what is not here', () => {
    const { db, studioId, members, mixId, idOf } = mixed()
    const parts = (...ids: number[]) => ({ basis: 'weight' as const, parts: ids.map(materialId => ({ materialId, parts: 1, private: false })) })
    const make = (...ids: number[]) => createMix(db, studioId, members.maker, { name: 'Another', ...parts(...ids) }, now)
    expect(make(idOf('shellac'), idOf('shellac'))).toMatchObject({ message: mixRefusals.twice })
    expect(make(idOf('shellac'), idOf('pva-white'))).toMatchObject({ message: mixRefusals.films })
    expect(make(idOf('shellac'), 99_999)).toMatchObject({ message: mixRefusals.noMaterial })
    expect(changeParts(db, studioId, members.maker, mixId, { basedOn: 1, ...parts(mixId, idOf('shellac')) }, now)).toMatchObject({ message: mixRefusals.itself('House varnish') })
    expect(changeParts(db, studioId, members.maker, idOf('shellac'), { basedOn: 1, ...parts(idOf('wax'), idOf('tung-oil')) }, now)).toMatchObject({ message: mixRefusals.notMix })
  })
})

it('every figure of the starter library is one that a sheet can hold', () => {
  const { db, studioId } = workshop()
  const versions = db.select().from(materialVersion).where(eq(materialVersion.studioId, studioId)).all()
  for (const edition of readEditions(db, studioId, versions).values()) for (const figure of edition.figures) expect(figureNames).toContain(figure.name)
})
