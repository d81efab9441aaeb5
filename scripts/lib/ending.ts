/** Stops what was started, last first and once, whatever ends us: the normal way, an error or a signal. */
export class Ending {
  readonly #steps: (() => Promise<unknown>)[] = []
  #running: Promise<void> | undefined

  get hasBegun(): boolean {
    return this.#running !== undefined
  }

  /** What was started while the end had already begun is stopped at once. */
  async add(step: () => Promise<unknown>): Promise<void> {
    if (this.#running) await step()
    else this.#steps.push(step)
  }

  run(): Promise<void> {
    this.#running ??= this.#runSteps()
    return this.#running
  }

  /** Ends on Ctrl-C, `kill` and a closed terminal; `exitCode` says what the caller's caller gets to see. */
  onSignals(exitCode: (signal: NodeJS.Signals) => number): void {
    for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) {
      process.on(signal, () => {
        if (this.hasBegun) return
        void this.run().finally(() => process.exit(exitCode(signal)))
      })
    }
  }

  async #runSteps(): Promise<void> {
    for (let step = this.#steps.pop(); step; step = this.#steps.pop()) {
      try {
        await step()
      } catch (error) {
        console.error(error instanceof Error ? error.message : error)
      }
    }
  }
}
