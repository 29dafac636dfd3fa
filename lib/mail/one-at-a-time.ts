export interface Turn {
  /** Gives the turn back; a second call does nothing. */
  release(): void
}

/** A gate that lets one through at a time, in the order they came. */
export function oneAtATime(): { enter(): Promise<Turn> } {
  let last: Promise<void> = Promise.resolve()
  return {
    async enter() {
      const before = last
      let release: () => void = () => undefined
      last = new Promise<void>((resolve) => {
        release = resolve
      })
      await before
      return { release }
    },
  }
}
