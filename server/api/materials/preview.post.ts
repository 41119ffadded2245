import { previewSheet } from '~~/server/services/material-preview'
import { defineStudioHandler } from '~~/server/utils/handler'
import { previewBody } from '#shared/schemas/material-edit'

/** POST /api/materials/preview: what a data sheet as typed so far would mean in the studio's usual air. Keeps nothing. */
export default defineStudioHandler({
  may: 'edit materials',
  body: previewBody,
  run: ({ studio, body, now }) => previewSheet(studio, body, now),
})
