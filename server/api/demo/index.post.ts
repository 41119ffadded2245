import { addDemoStudio } from '~~/server/services/demo-studio'
import { makeDemoRows } from '~~/server/utils/asker'
import { useConfig } from '~~/server/utils/config'
import { defineStudioHandler } from '~~/server/utils/handler'

/** POST /api/demo: adds the invented studio, or lets its looker back in; `studioId` is where to turn to. */
export default defineStudioHandler({
  may: 'change settings',
  run: ({ db, studio, person, now }) => addDemoStudio(db, useConfig(), person, () => makeDemoRows(db, studio.zone, now)),
})
