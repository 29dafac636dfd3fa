import { makeTasks } from '@/lib/worker/make-tasks'
import { runWorker } from '@/lib/worker/runner'

/** Worker entry: documents, imports and calculations; two at a time. */
await runWorker({ name: 'make', tasks: makeTasks, concurrency: 2 })
