import { Worker } from 'node:worker_threads'
import { answerTo } from '~~/server/asking/answers'
import type { Answer, Kind, Question } from '~~/server/asking/answers'
import type { AskReply, AskRequest } from '~~/server/asking/worker'
import type { DemoRows } from '~~/server/services/demo-rows'
import { searchUnder } from '~~/server/planning/search'
import type { KeptBases } from '~~/server/services/plan-questions'
import type { Database } from '~~/server/utils/database'
import { conflict } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { promiseRefusals } from '#shared/words/promise'

interface AskerOptions {
  /** The built worker; null answers in this thread. */
  worker: URL | null
  /** Milliseconds after which a worker that says nothing is ended. */
  patience?: number
  /** Milliseconds without a question after which the worker is let go. */
  idle?: number
}

interface Pending { key: string | null, cancel: SharedArrayBuffer, settle: (reply: AskReply) => void }

const superseded = () => conflict(promiseRefusals.newer)

/**
 * Answers questions to the plan on a copy of the database in a thread of its own: the server answers others meanwhile, and nobody waits
 * for a lock. A worker that crashes or falls silent is ended; the next question gets a new one.
 */
export class Asker {
  private worker: Worker | null = null
  private count = 0
  private closed = false
  private timer: ReturnType<typeof setTimeout> | undefined
  private readonly pending = new Map<number, Pending>()
  /** Of this thread, where there is no other. */
  private readonly kept: KeptBases = new Map()
  private readonly file: URL | null
  private readonly patience: number
  private readonly idle: number

  constructor({ worker, patience = 30_000, idle = 5 * 60_000 }: AskerOptions) {
    this.file = worker
    this.patience = patience
    this.idle = idle
  }

  /**
   * @param now ms UTC
   * @param key of questions with one key only the last is answered; null: each is
   * @throws when the worker failed
   */
  ask<K extends Kind>(db: Database, kind: K, question: Question<K>, now: number, key: string | null = null): Promise<Answer<K> | Refusal> {
    if (this.closed) return Promise.resolve(superseded())
    if (this.file === null) return answerTo(kind, { db, now, search: searchUnder(new SharedArrayBuffer(4)), kept: this.kept }, question)
    for (const older of this.pending.values()) if (key !== null && older.key === key) Atomics.store(new Int32Array(older.cancel), 0, 1)
    const request: AskRequest = { id: ++this.count, kind, question, now, file: db.$client.name, cancel: new SharedArrayBuffer(4) }
    return new Promise((resolve, reject) => {
      this.pending.set(request.id, { key, cancel: request.cancel, settle: (reply) => {
        if (Atomics.load(new Int32Array(request.cancel), 0) !== 0) resolve(superseded())
        else if (reply.ok) resolve(reply.answer as Answer<K>)
        else reject(new Error(`The question "${kind}" was not answered. ${reply.failed}`))
      } })
      this.worker ??= this.started(this.file!)
      this.worker.postMessage(request)
      this.wait()
    })
  }

  /** Ends the worker; what was asked and not answered ends as superseded. */
  async close(): Promise<void> {
    this.closed = true
    for (const { cancel } of this.pending.values()) Atomics.store(new Int32Array(cancel), 0, 1)
    await this.lose(this.worker, 'The server is closing.')
  }

  private started(file: URL): Worker {
    const worker = new Worker(file)
    worker.unref()
    worker.on('message', (reply: AskReply) => {
      const asked = this.pending.get(reply.id)
      this.pending.delete(reply.id)
      this.wait()
      asked?.settle(reply)
    })
    worker.on('error', error => this.lose(worker, error instanceof Error ? error.message : String(error)))
    worker.on('exit', code => this.lose(worker, `The worker ended with code ${code}.`))
    return worker
  }

  /** From each word on: a silent worker is ended with what it was asked, an idle one without a loss. */
  private wait(): void {
    clearTimeout(this.timer)
    const { worker } = this
    this.timer = setTimeout(() => void this.lose(worker, `The worker said nothing for ${this.patience} ms.`), this.pending.size > 0 ? this.patience : this.idle)
    this.timer.unref()
  }

  private async lose(worker: Worker | null, failed: string): Promise<void> {
    if (worker !== this.worker) return
    clearTimeout(this.timer)
    this.worker = null
    const lost = [...this.pending]
    this.pending.clear()
    for (const [id, { settle }] of lost) settle({ id, ok: false, failed })
    await worker?.terminate()
  }
}

let shared: Asker | null = null

/** The process's own: a worker thread in the built server, this thread in development. */
export function useAsker(): Asker {
  shared ??= new Asker({ worker: workerFile() })
  return shared
}

const workerFile = () => (import.meta.dev === false ? new URL('./asking-worker.mjs', import.meta.url) : null)
/** Playing the demo's weeks takes seconds on a quick machine, a minute on a slow one. ms. */
const demoPatience = 5 * 60_000
let making: Promise<DemoRows | null | Refusal> | null = null

/** The rows of a new demo studio, from a worker of its own, so that no question to the plan waits for it. Who asks meanwhile gets the same. */
export function makeDemoRows(db: Database, zone: string, now: number): Promise<DemoRows | null | Refusal> {
  if (making !== null) return making
  const apart = new Asker({ worker: workerFile(), patience: demoPatience })
  making = apart.ask(db, 'demo', { zone }, now).finally(() => {
    making = null
    return apart.close()
  })
  return making
}
