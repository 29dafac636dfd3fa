import { readFileSync } from 'node:fs'

/** Text of a file, or the fallback where it cannot be read. */
export function readOr(file, fallback) {
  try {
    return readFileSync(file, 'utf8')
  } catch {
    return fallback
  }
}

/** Clock tick at which the kernel started the process; '' where there is no such process. */
function startedAt(pid) {
  const afterName = readOr(`/proc/${pid}/stat`, '').split(') ').at(-1)
  return afterName.split(' ')[19] ?? ''
}

/**
 * What tells a process from all others. Its id alone is no proof: after a restart of a container
 * another process may carry it.
 */
export const markOf = (pid) => `${pid} ${startedAt(pid)}`

export const pidIn = (mark) => Number(mark.split(' ')[0])

export const isAlive = (mark) => startedAt(pidIn(mark)) !== '' && mark === markOf(pidIn(mark))
