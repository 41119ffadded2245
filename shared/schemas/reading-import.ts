import * as z from 'zod/mini'
import { mostReadings } from '#shared/logger-file/types'
import { clientKey } from '#shared/schemas/act'
import { fields } from '#shared/words/air'
import { loggerWords } from '#shared/words/logger-file'

const column = <Cell extends z.ZodMiniType>(cell: Cell) => z.array(cell).check(z.maxLength(mostReadings, loggerWords.tooMany))

/**
 * The readings of one logger's file, as columns of equal length, so that 50,000 of them go through in one body:
 * ms UTC, degrees Celsius or null, shares 0..1.
 */
export const readingImportRequest = z.object({
  clientKey,
  fileName: z.string().check(z.trim(), z.minLength(1, fields.fileName), z.maxLength(200, fields.fileName)),
  times: column(z.int().check(z.gte(0), z.lte(8.64e15))).check(z.minLength(1, fields.noReadings)),
  temps: column(z.nullable(z.number(fields.temperature).check(z.gte(-40, fields.temperature), z.lte(60, fields.temperature)))),
  humidities: column(z.number(fields.humidity).check(z.gte(0, fields.humidity), z.lte(1, fields.humidity))),
}).check(z.refine(({ times, temps, humidities }) => temps.length === times.length && humidities.length === times.length, { error: fields.columns, path: ['times'] }))
export type ReadingImportRequest = z.infer<typeof readingImportRequest>

/** What a file did. `importId` null when the room had every reading of it already. */
export interface ImportAnswer { importId: number | null, added: number, known: number }

/** A file that was brought in, ms UTC. */
export interface ImportState { id: number, fileName: string, readings: number, fromAt: number, toAt: number, toldAt: number, memberId: number | null, by: string | null }
