import { requeueRenders } from '@/lib/services/exhibit-renders'
import { jobContext } from '@/lib/worker/context'
import { makeTasks } from '@/lib/worker/make-tasks'
import { runWorker } from '@/lib/worker/runner'

/** Worker entry: documents and calculations, two at a time; the nightly comparison. */
await runWorker({
  name: 'make',
  tasks: makeTasks,
  concurrency: 2,
  crontab: '17 7 * * * compareProjections ?jobKey=compareProjections&max=3',
  beside: async () => {
    await requeueRenders(jobContext('renderExhibit'))
  },
})
