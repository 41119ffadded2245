import { addRule } from '~~/server/services/vapour-settings'
import { defineStudioHandler } from '~~/server/utils/handler'
import { ruleBody } from '#shared/schemas/vapour'

/** POST /api/rules */
export default defineStudioHandler({
  may: 'change settings',
  body: ruleBody,
  run: ({ db, studio, member, body, now }) => addRule(db, studio.id, member.id, body.text, now),
})
