import { createWallLink } from '~~/server/services/walls'
import { defineStudioHandler } from '~~/server/utils/handler'
import { wallLinkBody } from '#shared/schemas/wall-link'

/** POST /api/wall-links: a secret address for the handling sheet; `path` is told once. */
export default defineStudioHandler({
  may: 'change settings',
  body: wallLinkBody,
  run: ({ db, studio, body, now }) => {
    const { id, token } = createWallLink(db, studio.id, body.name, now)
    return { ok: true, id, path: `/wall/${token}` }
  },
})
