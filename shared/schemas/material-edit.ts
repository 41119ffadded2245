import * as z from 'zod/mini'
import { sheetFields } from '#shared/data-sheet/fields'
import type { SheetField } from '#shared/data-sheet/fields'
import { hardenings } from '#shared/data-sheet/hardening'
import { contents } from '#shared/library/required-cautions'
import { figureNames, materialKinds, solvents } from '#shared/library/types'
import { name, rowId } from '#shared/schemas/common'
import { milestoneNames, mixBases, sourceKeys } from '#shared/terms'
import type { MilestoneName } from '#shared/terms'
import { sheetRefusals } from '#shared/words/data-sheet'
import { mixRefusals } from '#shared/words/mixes'

const typed = z.string(sheetRefusals.text).check(z.trim(), z.maxLength(60, sheetRefusals.text))
const text = z.string(sheetRefusals.text).check(z.trim(), z.maxLength(200, sheetRefusals.text))
const held = z.array(z.enum(contents, sheetRefusals.contents)).check(z.maxLength(contents.length, sheetRefusals.contents))
const fieldNames = Object.keys(sheetFields) as [SheetField, ...SheetField[]]

/** What a data sheet says, with its figures as typed; empty or missing is not on the sheet. */
const sheet = {
  kind: z.enum(materialKinds, sheetRefusals.kind),
  hardening: z.enum(hardenings, sheetRefusals.hardening),
  solvent: z.nullable(z.enum(solvents, sheetRefusals.solvent)),
  contents: held,
  mustLieLevel: z.boolean(),
  gloves: z.boolean(),
  /** Hazards of its safety data sheet in the studio's own words. */
  hazards: text,
  figures: z.partialRecord(z.enum(fieldNames), typed),
}

/** POST /api/materials: a new material from its data sheet. */
export const dataSheetBody = z.strictObject({ name: name(sheetRefusals.name), ...sheet })
export type DataSheetBody = z.output<typeof dataSheetBody>

/** POST /api/materials/preview: what such a sheet would mean here. Nothing is kept. */
export const previewBody = z.strictObject({ name: z.string().check(z.maxLength(80)), ...sheet })
export type PreviewBody = z.output<typeof previewBody>

const sourced = { source: text, key: z.enum(sourceKeys) }

/** POST /api/materials/[id]/editions: a new edition of its figures, each as typed. `basedOn` is the edition that the form was filled from. */
export const editionBody = z.strictObject({
  basedOn: rowId,
  note: text,
  solvent: z.enum(solvents, sheetRefusals.solvent),
  contents: held,
  mustLieLevel: z.boolean(),
  gloves: z.boolean(),
  hazards: text,
  rungs: z.array(z.strictObject({ name: z.enum(milestoneNames), low: typed, typical: typed, high: typed, ...sourced })).check(z.maxLength(milestoneNames.length)),
  windows: z.array(z.strictObject({ from: typed, to: typed, recovery: z.string(sheetRefusals.recovery).check(z.trim(), z.maxLength(80, sheetRefusals.recovery)), recoveryMin: z.int(sheetRefusals.recoveryMin).check(z.gte(0, sheetRefusals.recoveryMin), z.lte(600, sheetRefusals.recoveryMin)), ...sourced })).check(z.maxLength(4)),
  figures: z.array(z.strictObject({ name: z.enum(figureNames), low: typed, typical: typed, high: typed, ...sourced })).check(z.maxLength(figureNames.length)),
})
export type EditionBody = z.output<typeof editionBody>

/** POST /api/materials/[id]/back: the figures of an earlier edition, as a new one. */
export const backBody = z.strictObject({ no: rowId, basedOn: rowId })

/** PATCH /api/materials/[id]: another name, or put away and brought back. */
export const materialPatch = z.strictObject({ name: z.optional(name(sheetRefusals.name)), putAway: z.optional(z.boolean()) })
export type MaterialPatch = z.output<typeof materialPatch>

/** GET /api/materials?away=1: those that were put away. */
export const materialsQuery = z.object({ away: z.optional(z.enum(['0', '1'])) })

const part = z.strictObject({ materialId: rowId, parts: z.number(mixRefusals.parts).check(z.gt(0, mixRefusals.parts), z.lte(10_000, mixRefusals.parts)), private: z.boolean() })
const parts = { basis: z.enum(mixBases, mixRefusals.basis), parts: z.array(part).check(z.minLength(2, mixRefusals.two), z.maxLength(12, mixRefusals.many)) }

/** POST /api/mixes. */
export const mixBody = z.strictObject({ name: name(sheetRefusals.name), ...parts })
export type MixBody = z.output<typeof mixBody>
/** POST /api/materials/[id]/mix: other parts; its ladder is worked out anew, as a new edition. */
export const mixPartsBody = z.strictObject({ basedOn: rowId, ...parts })
export type MixPartsBody = z.output<typeof mixPartsBody>

/** What stands in for something the sheet does not say, or what a limit is for. Minutes after a normal coat goes on in the studio's usual air. */
export interface ReadyWire { name: MilestoneName, likelyMin: number | null, giveTillMin: number | null }

/** What a sheet as typed would mean: problems by field, or when it would be ready, what stood in, and which cautions it carries. */
export interface PreviewWire {
  fields: Record<string, string>
  ready: ReadyWire[]
  usual: { tempC: number, rh: number }
  standIns: number
  cautions: string[]
}

/** GET /api/materials/[id]/editions: newest first. `changes` are against the one before; private parts are told only to those who may see them. */
export interface EditionWire { no: number, at: string | null, by: string | null, note: string, changes: string[] }
