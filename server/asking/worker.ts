import { parentPort } from 'node:worker_threads'
import { answerTo } from '~~/server/asking/answers'
import type { Kind, Question } from '~~/server/asking/answers'
import { searchUnder } from '~~/server/planning/search'
import type { KeptBases } from '~~/server/services/plan-questions'
import { copyOf } from '~~/server/utils/database'

/** What the worker is asked. `cancel` is shared memory of one number: anything but 0 ends the question unanswered. */
export interface AskRequest { id: number, kind: Kind, question: Question<Kind>, now: number, file: string, cancel: SharedArrayBuffer }

/** `failed`: what went wrong, for the log. */
export type AskReply = { id: number, ok: true, answer: unknown } | { id: number, ok: false, failed: string }

const kept: KeptBases = new Map()

async function reply({ id, kind, question, now, file, cancel }: AskRequest): Promise<AskReply> {
  if (Atomics.load(new Int32Array(cancel), 0) !== 0) return { id, ok: true, answer: null }
  const db = copyOf(file)
  try {
    return { id, ok: true, answer: await answerTo(kind, { db, now, search: searchUnder(cancel), kept }, question) }
  }
  catch (error) {
    return { id, ok: false, failed: error instanceof Error ? error.stack ?? error.message : String(error) }
  }
  finally {
    db.$client.close()
  }
}

// One after another: what one question has worked out serves the next.
let last: Promise<unknown> = Promise.resolve()
parentPort?.on('message', (request: AskRequest) => {
  last = last.then(() => reply(request)).then(found => parentPort?.postMessage(found))
})
