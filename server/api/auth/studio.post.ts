import { absent } from '~~/server/utils/errors'
import { defineStudioHandler } from '~~/server/utils/handler'
import { switchStudio } from '~~/server/services/sessions'
import { settings } from '#shared/words/settings'
import { switchStudioBody } from '#shared/schemas/session'

/** POST /api/auth/studio: turns this session to another of the person's studios. */
export default defineStudioHandler({
  may: 'signed in',
  body: switchStudioBody,
  run: ({ db, sessionHash, person, body }) =>
    switchStudio(db, sessionHash, person.id, body.studioId) ? { ok: true } : absent(settings.notYourStudio),
})
