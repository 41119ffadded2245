import { and, eq, inArray } from 'drizzle-orm'
import { adviceAnswer, coat } from '~~/db/schema'
import type { Membership } from '~~/server/services/sessions'
import { change } from '~~/server/utils/change'
import type { Database } from '~~/server/utils/database'
import { absent } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import type { Advice } from '#shared/drying/types'
import type { AdviceLine, AdviceRequest } from '#shared/schemas/advice'
import { answersTo, hazeKnown } from '#shared/words/advice-answers'

/** Remembers an answer to a piece of advice about a coat; a second answer takes the place of the first. */
export function answerAdvice(db: Database, studioId: number, who: Membership, coatId: number, { code, answer }: AdviceRequest, now: number): { ok: true } | Refusal {
  return change(db, studioId, 'work', (tx): { ok: true } | Refusal => {
    if (!tx.select({ id: coat.id }).from(coat).where(owned(coat, studioId, coatId)).get()) return absent()
    const values = { answer, memberId: who.id, at: now }
    tx.insert(adviceAnswer).values({ studioId, coatId, code, ...values }).onConflictDoUpdate({ target: [adviceAnswer.coatId, adviceAnswer.code], set: values }).run()
    return { ok: true }
  })
}

/** The advice about some coats with what was answered to it, and what haze has done to the same material before. */
export function adviceLines(db: Database, studioId: number, coats: readonly { id: number, versionId: number | null, advice: readonly Advice[] }[]): Map<number, AdviceLine[]> {
  const ids = coats.map(each => each.id)
  const versions = coats.flatMap(each => each.versionId ?? [])
  const answers = ids.length === 0 ? [] : db.select().from(adviceAnswer).where(scoped(adviceAnswer, studioId, inArray(adviceAnswer.coatId, ids))).all()
  const before = versions.length === 0
    ? []
    : db.select({ versionId: coat.materialVersionId, coatId: coat.id, answer: adviceAnswer.answer }).from(adviceAnswer).innerJoin(coat, eq(coat.id, adviceAnswer.coatId))
        .where(and(scoped(adviceAnswer, studioId, eq(adviceAnswer.code, 'blush')), inArray(coat.materialVersionId, versions))).all()
  return new Map(coats.map(({ id, versionId, advice }) => {
    const others = before.filter(each => each.versionId === versionId && each.coatId !== id)
    const known = hazeKnown({ wentOn: others.filter(each => each.answer === 'going on').length, haze: others.filter(each => each.answer === 'haze').length })
    return [id, advice.map(({ code, text }): AdviceLine => ({
      code, text, answers: answersTo(code), answered: answers.find(each => each.coatId === id && each.code === code)?.answer ?? null, known: code === 'blush' ? known : null,
    }))]
  }))
}
