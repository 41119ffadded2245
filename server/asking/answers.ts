import { askerOf } from '~~/server/planning/questions'
import { reckonPromises, savesPromise } from '~~/server/planning/promise-watch'
import type { Search } from '~~/server/planning/search'
import { demoRows } from '~~/server/services/demo-rows'
import { askWhatIf, bottleneck } from '~~/server/services/plan-questions'
import type { KeptBases } from '~~/server/services/plan-questions'
import { checkPin } from '~~/server/services/pins'
import { promiseForNew, promiseState } from '~~/server/services/promises'
import { checkStart } from '~~/server/services/start-check'
import type { Database } from '~~/server/utils/database'
import type { PinBody } from '#shared/schemas/pin'
import type { BatchToComeRequest } from '#shared/schemas/promise'
import type { WhatIf } from '#shared/schemas/what-if'

/** Where a question is answered: on which database, at which instant (ms UTC), by which search, and what was worked out before. */
export interface Asked { db: Database, now: number, search: Search, kept: KeptBases }

interface OfStudio { studioId: number }

/** Every question that takes a search or scenarios, and so is answered apart from the server's own thread. None writes anything. */
export const answers = {
  'bottleneck': ({ db, now, search, kept }: Asked, { studioId }: OfStudio) => bottleneck(db, studioId, now, askerOf(search), kept),
  'what if': ({ db, now, search, kept }: Asked, { studioId, change }: OfStudio & { change: WhatIf }) => askWhatIf(db, studioId, change, now, askerOf(search), kept),
  'start': ({ db, now, search }: Asked, { studioId, request }: OfStudio & { request: BatchToComeRequest }) => checkStart(db, studioId, request, now, search),
  'date of new': ({ db, now, search }: Asked, { studioId, request }: OfStudio & { request: BatchToComeRequest }) => promiseForNew(db, studioId, request, now, search),
  'date': ({ db, now, search }: Asked, { studioId, batchId }: OfStudio & { batchId: number }) => promiseState(db, studioId, batchId, now, search),
  'promises': ({ db, now, search }: Asked, { studioId }: OfStudio) => reckonPromises(db, studioId, now, search),
  'rescue': ({ db, now, search }: Asked, { studioId, orderId, batchId }: OfStudio & { orderId: number, batchId: number }) => savesPromise(db, studioId, orderId, batchId, now, search),
  'demo': ({ db, now }: Asked, { zone }: { zone: string }) => demoRows(db, now, zone),
  'pin': ({ db, now, search }: Asked, { studioId, body }: OfStudio & { body: PinBody }) => checkPin(db, studioId, body, now, search),
}

export type Kind = keyof typeof answers
export type Question<K extends Kind> = Parameters<typeof answers[K]>[1]
export type Answer<K extends Kind> = Awaited<ReturnType<typeof answers[K]>>

/** Answers one question. */
export function answerTo<K extends Kind>(kind: K, asked: Asked, question: Question<K>): Promise<Answer<K>> {
  const work = answers[kind] as (asked: Asked, question: Question<K>) => Promise<Answer<K>>
  return work(asked, question)
}
