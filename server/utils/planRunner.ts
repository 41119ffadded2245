import { Worker } from 'node:worker_threads'
import { answer } from '~~/server/planner/answer'
import type { PlanAnswer, PlanRequest } from '~~/server/planner/answer'
import type { Violation } from '#shared/planning/check'
import type { Plan, PlanProblem } from '#shared/planning/types'

/** `superseded`: a newer problem with the same key was given; drop this one. The others are worth a line in the log; the last plan stays. */
export type PlanResult = { ok: true, plan: Plan, broken: readonly Violation[] } | { ok: false, reason: 'superseded' | 'timeout' | 'crashed' | 'refused' | 'closed', message: string }

export interface RunnerOptions {
  /** The built worker; null plans in this thread. */
  worker: URL | null
  /** Milliseconds for a search; the first plan may take longer. */
  millis?: number
  /** Milliseconds beyond that after which a worker that says nothing is ended. */
  patience?: number
}

export interface RunOptions {
  seed?: number
  /** Plans built or changed at most; without it as many as there is time for. */
  schedules?: number
  /** Milliseconds for this search instead of the runner's own. */
  millis?: number
  /** Told the first plan at once; the answer is the best. */
  onFirst?: (plan: Plan, broken: readonly Violation[]) => void
}

interface Job { key: string, request: PlanRequest, onFirst: RunOptions['onFirst'], settle: (result: PlanResult) => void }

/** In this thread nobody is held up for longer than these take. */
const schedulesHere = 24

const superseded: PlanResult = { ok: false, reason: 'superseded', message: 'A newer problem was given.' }
const shut: PlanResult = { ok: false, reason: 'closed', message: 'The planner is closed.' }

/** Plans in the background, one problem at a time. A worker that crashes or falls silent is ended, and a new one started for the next problem. */
export class PlanRunner {
  private worker: Worker | null = null
  private current: Job | null = null
  private timer: ReturnType<typeof setTimeout> | undefined
  private count = 0
  private closed = false
  private readonly waiting = new Map<string, Job>()
  private readonly file: URL | null
  private readonly millis: number
  private readonly patience: number

  /** The usual search time and patience are for a studio of some hundred pieces; see the bench. */
  constructor({ worker, millis = 1000, patience = 20_000 }: RunnerOptions) {
    this.file = worker
    this.millis = millis
    this.patience = patience
  }

  /** Of problems with one key the last one wins: an older one, waiting or being solved, ends as superseded. Never rejects. */
  run(key: string, problem: PlanProblem, { seed = 1, schedules, millis = this.millis, onFirst }: RunOptions = {}): Promise<PlanResult> {
    if (this.closed) return Promise.resolve(shut)
    this.waiting.get(key)?.settle(superseded)
    this.waiting.delete(key)
    if (this.current?.key === key) Atomics.store(new Int32Array(this.current.request.cancel), 0, 1)
    return new Promise((settle) => {
      const most = schedules ?? (this.file ? Infinity : schedulesHere)
      this.waiting.set(key, { key, settle, onFirst, request: { id: ++this.count, problem, seed, schedules: most, millis, cancel: new SharedArrayBuffer(4) } })
      this.next()
    })
  }

  /** Ends the worker; what was asked and not answered ends as closed. */
  async close(): Promise<void> {
    this.closed = true
    clearTimeout(this.timer)
    const { worker, current } = this
    this.worker = null
    this.current = null
    for (const job of [...this.waiting.values(), ...(current ? [current] : [])]) job.settle(shut)
    this.waiting.clear()
    await worker?.terminate()
  }

  private next(): void {
    const job = this.waiting.values().next().value
    if (this.current || !job) return
    this.waiting.delete(job.key)
    this.current = job
    if (this.file === null) {
      setImmediate(() => this.heard(answer(job.request, first => this.heard(first))))
      return
    }
    const worker = this.worker ??= this.started(this.file)
    const limit = this.millis + this.patience
    this.timer = setTimeout(() => this.lose(worker, 'timeout', `The planner said nothing for ${limit} ms.`), limit)
    worker.postMessage(job.request)
  }

  private started(file: URL): Worker {
    const worker = new Worker(file)
    worker.unref()
    worker.on('message', (reply: PlanAnswer) => this.heard(reply))
    worker.on('error', error => this.lose(worker, 'crashed', error instanceof Error ? error.message : String(error)))
    worker.on('exit', code => this.lose(worker, 'crashed', `The planner's worker ended with code ${code}.`))
    return worker
  }

  private heard(reply: PlanAnswer): void {
    const job = this.current
    if (!job || reply.id !== job.request.id) return
    if (reply.ok && !reply.last) return job.onFirst?.(reply.plan, reply.broken)
    const stopped = Atomics.load(new Int32Array(job.request.cancel), 0) !== 0
    this.finish(stopped ? superseded : reply.ok ? { ok: true, plan: reply.plan, broken: reply.broken } : { ok: false, reason: 'refused', message: reply.message })
  }

  private lose(worker: Worker, reason: 'crashed' | 'timeout', message: string): void {
    if (worker !== this.worker) return
    this.worker = null
    void worker.terminate()
    if (this.current) this.finish({ ok: false, reason, message })
  }

  private finish(result: PlanResult): void {
    clearTimeout(this.timer)
    const job = this.current
    this.current = null
    job?.settle(result)
    this.next()
  }
}

let shared: PlanRunner | null = null

/** The process's runner: a worker thread in the built server, this thread in development and in tests. */
export function usePlanRunner(): PlanRunner {
  shared ??= new PlanRunner({ worker: import.meta.dev === false ? new URL('./planner-worker.mjs', import.meta.url) : null })
  return shared
}
