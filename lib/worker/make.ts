import { requeueRenders } from '@/lib/services/exhibit-renders'
import { jobContext } from '@/lib/worker/context'
import { makeTasks } from '@/lib/worker/make-tasks'
import { runWorker } from '@/lib/worker/runner'

/** Worker entry: documents, imports and calculations; two at a time. */
await runWorker({
  name: 'make',
  tasks: makeTasks,
  concurrency: 2,
  beside: async () => {
    await requeueRenders(jobContext('renderExhibit'))
  },
})
