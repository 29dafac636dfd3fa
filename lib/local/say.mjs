/** An expected stop: its message is the one line a person reads, without a stack. */
export class Stop extends Error {}

/** One line of progress on standard output. */
export function say(line) {
  process.stdout.write(`${line}\n`)
}

/** Prints an error: the line alone for a Stop, the whole stack for anything unforeseen. */
export function complain(error) {
  const text = error instanceof Stop ? error.message : (error?.stack ?? String(error))
  process.stderr.write(`${text}\n`)
}
