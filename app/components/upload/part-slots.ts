/** At most so many parts are on their way at one time, over all files of the page. */
export class PartSlots {
  #free: number;
  #waiting: (() => void)[] = [];

  constructor(count: number) {
    this.#free = count;
  }

  /** Waits for a slot; what it returns gives the slot back, once. */
  async take(): Promise<() => void> {
    if (this.#free > 0) this.#free -= 1;
    else await new Promise<void>((resolve) => this.#waiting.push(resolve));
    let given = false;
    return () => {
      if (given) return;
      given = true;
      const next = this.#waiting.shift();
      if (next) next();
      else this.#free += 1;
    };
  }
}
