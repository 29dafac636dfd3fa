/** Work that is asked for faster than it is done: one run at a time, always the newest next. */
export interface LatestRuns<Input, Output> {
  /** Asks for a run; a run that still waits is replaced by it. Gives its number. */
  ask: (input: Input) => number
  /** A run has ended; the one that waits is sent. */
  answered: (seq: number, output: Output) => void
  /** Runs sent before are forgotten: their answers are not shown. */
  forget: () => void
}

/**
 * Numbers runs so that results are shown in order: one older than the last shown never is.
 * `send` starts a run elsewhere, such as in a worker; `show` gets each result once.
 */
export function latestRuns<Input, Output>(
  send: (seq: number, input: Input) => void,
  show: (seq: number, output: Output) => void,
): LatestRuns<Input, Output> {
  let lastAsked = 0
  let lastShown = 0
  let inFlight = 0
  let waiting: { seq: number; input: Input } | undefined

  function next() {
    if (inFlight !== 0 || !waiting) return
    const { seq, input } = waiting
    waiting = undefined
    inFlight = seq
    send(seq, input)
  }

  return {
    ask(input) {
      lastAsked += 1
      waiting = { seq: lastAsked, input }
      next()
      return lastAsked
    },
    answered(seq, output) {
      if (seq === inFlight) inFlight = 0
      if (seq > lastShown) {
        lastShown = seq
        show(seq, output)
      }
      next()
    },
    forget() {
      lastShown = lastAsked
      inFlight = 0
      waiting = undefined
    },
  }
}
