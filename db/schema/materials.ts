import { sql } from 'drizzle-orm'
import { check, integer, primaryKey, real, sqliteTable, text, unique } from 'drizzle-orm/sqlite-core'
import { flag, id, instant, oneOf, studioKey, within } from './columns'
import { studioColumn } from './studio'
import { drivers, milestoneNames, mixBases, sourceKeys } from '#shared/terms'
import type { Driver, MilestoneName, MixBasis, SourceKey } from '#shared/terms'

export const material = sqliteTable('material', {
  id: id(),
  studioId: studioColumn(),
  libraryKey: text('library_key'),
  name: text('name').notNull(),
  archivedAt: instant('archived_at'),
}, t => [studioKey(t), unique().on(t.studioId, t.libraryKey), unique().on(t.studioId, t.name)])

/** One edition of a material's figures. Once a coat has used it (`frozen`) it is never changed. */
export const materialVersion = sqliteTable('material_version', {
  id: id(),
  studioId: studioColumn(),
  materialId: integer('material_id').notNull(),
  no: integer('no').notNull(),
  frozen: flag('frozen').notNull().default(false),
  kind: text('kind').notNull(),
  film: text('film').$type<'open' | 'joint'>().notNull(),
  solvent: text('solvent').notNull(),
  mustLieLevel: flag('must_lie_level').notNull().default(false),
  dryingOil: flag('drying_oil').notNull().default(false),
  isocyanate: flag('isocyanate').notNull().default(false),
  glovesUntil: text('gloves_until').$type<MilestoneName>(),
  cautions: text('cautions', { mode: 'json' }).$type<string[]>().notNull(),
}, t => [studioKey(t), within(t, t.materialId, material), unique().on(t.materialId, t.no), oneOf('material_version_film', t.film, ['open', 'joint'])])

/** A figure of the sheet that is not a milestone: temperatures, humidity limits, film, coverage, pot life. */
export const materialFigure = sqliteTable('material_figure', {
  studioId: studioColumn(),
  versionId: integer('version_id').notNull(),
  name: text('name').notNull(),
  low: real('low'),
  typical: real('typical').notNull(),
  high: real('high'),
  unit: text('unit').notNull(),
  source: text('source').notNull(),
  key: text('key').$type<SourceKey>().notNull(),
}, t => [
  primaryKey({ columns: [t.versionId, t.name] }), within(t, t.versionId, materialVersion), oneOf('material_figure_key', t.key, sourceKeys),
  check('material_figure_order', sql`coalesce(${t.low}, ${t.typical}) <= ${t.typical} and ${t.typical} <= coalesce(${t.high}, ${t.typical})`),
])

/** A rung of the ladder: minutes from application at the reference climate in a normal coat. */
export const milestone = sqliteTable('milestone', {
  studioId: studioColumn(),
  versionId: integer('version_id').notNull(),
  ordinal: integer('ordinal').notNull(),
  name: text('name').$type<MilestoneName>().notNull(),
  driver: text('driver').$type<Driver>().notNull(),
  low: real('low').notNull(),
  typical: real('typical').notNull(),
  high: real('high').notNull(),
  handTest: text('hand_test'),
  source: text('source').notNull(),
  key: text('key').$type<SourceKey>().notNull(),
}, t => [
  primaryKey({ columns: [t.versionId, t.ordinal] }), unique().on(t.versionId, t.name), within(t, t.versionId, materialVersion),
  oneOf('milestone_name', t.name, milestoneNames), oneOf('milestone_driver', t.driver, drivers), oneOf('milestone_key', t.key, sourceKeys),
  check('milestone_order', sql`0 < ${t.low} and ${t.low} <= ${t.typical} and ${t.typical} <= ${t.high}`),
])

/** An interval in which the next coat may go on, in reference minutes; either end may be open. */
export const recoatWindow = sqliteTable('recoat_window', {
  studioId: studioColumn(),
  versionId: integer('version_id').notNull(),
  ordinal: integer('ordinal').notNull(),
  fromMin: real('from_min'),
  toMin: real('to_min'),
  recovery: text('recovery'),
  recoveryMin: integer('recovery_min').notNull().default(0),
  source: text('source').notNull(),
  key: text('key').$type<SourceKey>().notNull(),
}, t => [
  primaryKey({ columns: [t.versionId, t.ordinal] }), within(t, t.versionId, materialVersion), oneOf('recoat_window_key', t.key, sourceKeys),
  check('recoat_window_span', sql`coalesce(${t.fromMin}, 0) >= 0 and (${t.toMin} is null or ${t.toMin} > coalesce(${t.fromMin}, 0))`),
])

export const tin = sqliteTable('tin', {
  id: id(),
  studioId: studioColumn(),
  materialId: integer('material_id').notNull(),
  openedAt: instant('opened_at').notNull(),
}, t => [studioKey(t), within(t, t.materialId, material)])

/** What one edition of a material is mixed from; its ladder lies in that edition like any other. A coat names the mix it was poured from. */
export const mix = sqliteTable('mix', {
  id: id(),
  studioId: studioColumn(),
  materialId: integer('material_id').notNull(),
  versionId: integer('version_id').notNull().unique(),
  basis: text('basis').$type<MixBasis>().notNull().default('volume'),
}, t => [studioKey(t), within(t, t.materialId, material), within(t, t.versionId, materialVersion), oneOf('mix_basis', t.basis, mixBases)])

export const mixPart = sqliteTable('mix_part', {
  studioId: studioColumn(),
  mixId: integer('mix_id').notNull(),
  materialId: integer('material_id').notNull(),
  parts: real('parts').notNull(),
  private: flag('private').notNull().default(false),
}, t => [primaryKey({ columns: [t.mixId, t.materialId] }), within(t, t.mixId, mix), within(t, t.materialId, material), check('mix_part_parts', sql`${t.parts} > 0`)])
