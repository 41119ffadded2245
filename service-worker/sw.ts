// Wiring only: each concern has a file of its own beside this one.
import { takeOver } from './life'

declare const self: ServiceWorkerGlobalScope

takeOver(self)
