import { addWitness } from '~~/server/services/witnesses'
import { defineStudioHandler } from '~~/server/utils/handler'
import { witnessBody } from '#shared/schemas/witness'

/** POST /api/witnesses: a board was coated alongside; it speaks for that coat. */
export default defineStudioHandler({
  may: 'record touch tests',
  body: witnessBody,
  run: ({ db, studio, body }) => addWitness(db, studio.id, body.actId),
})
