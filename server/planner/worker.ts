import { parentPort } from 'node:worker_threads'
import { answer } from './answer'
import type { PlanRequest } from './answer'

parentPort?.on('message', (request: PlanRequest) => parentPort?.postMessage(answer(request, first => parentPort?.postMessage(first))))
