import { removeDemoStudio } from '~~/server/services/demo-studio'
import { useConfig } from '~~/server/utils/config'
import { defineStudioHandler } from '~~/server/utils/handler'

/** DELETE /api/demo: takes the invented studio away whole. */
export default defineStudioHandler({
  may: 'change settings',
  run: ({ db, person }) => removeDemoStudio(db, useConfig(), person),
})
