import type { TaskList } from 'graphile-worker'

/**
 * What the making worker can do, by job name (lib/queue/jobs.ts). A task parses its payload with
 * the job's schema and calls one service with `jobContext(name)`.
 */
export const makeTasks: TaskList = {}
