import * as z from 'zod/mini'
import type { MilestoneName } from '#shared/terms'
import { fields } from '#shared/words/rates'

/** GET /api/rates?coats=3,4: at most 20 coats; none named, none explained. */
export const ratesQuery = z.object({ coats: z._default(z.string(fields.coats).check(z.regex(/^([1-9]\d{0,9}(,[1-9]\d{0,9}){0,19})?$/, fields.coats)), '') })

/**
 * What the speed of a film comes from now. `factor` against its sheet: 0.41 takes 1/0.41 as long. `warmth` and `damp`
 * are the parts of temperature and humidity alone. Celsius and a share 0..1; `assumed` when no reading speaks.
 */
export interface RateWire { coatId: number, material: string, towards: MilestoneName, factor: number, warmth: number, damp: number, tempC: number, rh: number, assumed: boolean, sheetTempC: number, sheetRh: number }
