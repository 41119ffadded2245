// Wiring only: each concern has a file of its own beside this one.
import { takeOver } from './life'
import { listenForPush } from './push'
import { standIn } from './unreached'

declare const self: ServiceWorkerGlobalScope

takeOver(self)
listenForPush(self)
standIn(self)
