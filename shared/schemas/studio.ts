import * as z from 'zod/mini'
import { name } from '#shared/schemas/common'
import { email, newPassword } from '#shared/schemas/session'
import { fields } from '#shared/words/fields'

function isZone(zone: string) {
  try {
    return new Intl.DateTimeFormat('en', { timeZone: zone }).resolvedOptions().timeZone !== ''
  }
  catch {
    return false
  }
}

const zone = z.string(fields.zone).check(z.refine(isZone, fields.zone))

/** Somebody new to the installation. */
export const newPerson = z.object({ name: name(fields.personName), email, password: newPassword })

/** POST /api/studios; `person` is left out by somebody who is signed in. */
export const newStudioBody = z.object({ name: name(fields.studioName), zone, person: z.optional(newPerson) })
export type NewStudio = z.output<typeof newStudioBody>

/** PATCH /api/studio */
export const studioPatch = z.strictObject({
  name: z.optional(name(fields.studioName)),
  zone: z.optional(zone),
  units: z.optional(z.enum(['metric', 'us'], fields.units)),
  usualTempC: z.optional(z.number(fields.usualTemp).check(z.gte(-40, fields.usualTemp), z.lte(60, fields.usualTemp))),
  usualRh: z.optional(z.number(fields.usualRh).check(z.gte(0, fields.usualRh), z.lte(1, fields.usualRh))),
})
export type StudioPatch = z.output<typeof studioPatch>

/** GET /api/studio. Temperatures in degrees Celsius, humidity 0 to 1. */
export interface StudioWire { id: number, name: string, zone: string, units: 'metric' | 'us', usualTempC: number, usualRh: number, revision: number, demo: boolean }
