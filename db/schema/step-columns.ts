import type { AnySQLiteColumn } from 'drizzle-orm/sqlite-core'
import { integer, text } from 'drizzle-orm/sqlite-core'
import { coatSizes, dustClasses, grounds, holds, placeKinds, stepKinds } from '#shared/terms'
import type { CoatSize, DustClass, Ground, Hold, PlaceKind, StepKind } from '#shared/terms'
import { flag, oneOf } from './columns'

/** How a step is done: the same words in a schedule and, copied at the start, in a piece. */
export const howDone = () => ({
  kind: text('kind').$type<StepKind>().notNull(),
  coatSize: text('coat_size').$type<CoatSize>().notNull().default('normal'),
  ground: text('ground').$type<Ground>().notNull().default('primed'),
  hold: text('hold').$type<Hold>(),
  placeKind: text('place_kind').$type<PlaceKind>(),
  untilEnough: flag('until_enough').notNull().default(false),
  setupMin: integer('setup_min').notNull().default(0),
  pieceMin: integer('piece_min').notNull(),
  cleanMin: integer('clean_min').notNull().default(0),
  releaseMin: integer('release_min').notNull().default(0),
  hands: integer('hands').notNull().default(1),
  dust: text('dust').$type<DustClass>().notNull().default('none'),
  mayRunOver: flag('may_run_over').notNull().default(false),
})

type HowDone = Record<'kind' | 'coatSize' | 'ground' | 'hold' | 'placeKind' | 'dust', AnySQLiteColumn>

/** Allows these columns of a table only their words. */
export const howDoneWords = (table: string, t: HowDone) => [
  oneOf(`${table}_kind`, t.kind, stepKinds), oneOf(`${table}_size`, t.coatSize, coatSizes), oneOf(`${table}_ground`, t.ground, grounds),
  oneOf(`${table}_hold`, t.hold, holds), oneOf(`${table}_place`, t.placeKind, placeKinds), oneOf(`${table}_dust`, t.dust, dustClasses),
]
