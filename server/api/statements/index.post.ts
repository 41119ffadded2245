import { addStatement } from '~~/server/services/vapour-settings'
import { defineStudioHandler } from '~~/server/utils/handler'
import { statementBody } from '#shared/schemas/vapour'

/** POST /api/statements */
export default defineStudioHandler({
  may: 'change settings',
  body: statementBody,
  run: ({ db, studio, member, body, now }) => addStatement(db, studio.id, member.id, body.text, now),
})
