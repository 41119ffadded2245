import { cautionParts } from '#shared/library/caution-parts'
import type { RagAnswer } from '#shared/terms'

/** What may be answered of oily rags, in one wording on every screen and call. */
export const ragAnswerTexts: Record<RagAnswer, string> = { 'flat outdoors': 'Flat outdoors', 'in water can': 'In the water can', 'not dealt with': 'Not dealt with yet' }

/** All answers, for a sentence that asks for one of them. */
export const ragAnswersListed = 'flat outdoors, in the water can, or not dealt with yet'

/** Oily rags, asked until somebody says. */
export const ragWords = {
  ask: (room: string) => `Where are the oily rags from ${room}?`,
  since: (time: string) => `Oil was last on the rags: ${time}. ${cautionParts.ragsHeat} ${cautionParts.ragsAll}`,
} as const
