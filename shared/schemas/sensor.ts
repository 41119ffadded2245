import * as z from 'zod/mini'

/** POST /api/sensor/[token] */
export const sensorToken = z.object({ token: z.string().check(z.regex(/^[\w-]{43}$/)) })

/** Anything: shared/sensor.ts reads it, so that every figure gets its own sentence. */
export const sensorBody = z.unknown()

/** GET /api/rooms/[id]/sensor: when the address was made and used, and why what it sent last could not be read. ISO 8601. */
export interface SensorWire { madeAt: string, heardAt: string | null, refusedAt: string | null, refusal: string | null }
