import { readDemo } from '~~/server/services/demo-studio'
import { useConfig } from '~~/server/utils/config'
import { defineStudioHandler } from '~~/server/utils/handler'

/** GET /api/demo: whether an invented studio may be added, whether it is there, what goes with it. */
export default defineStudioHandler({
  may: 'change settings',
  run: ({ db, person }) => readDemo(db, useConfig(), person),
})
