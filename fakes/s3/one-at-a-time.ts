/** Runs work of the same name one after the other, work of different names side by side. */
export class OneAtATime {
  #last = new Map<string, Promise<unknown>>();

  run<T>(name: string, work: () => Promise<T>): Promise<T> {
    const result = (this.#last.get(name) ?? Promise.resolve()).then(work);
    const settled = result.catch(() => undefined);
    this.#last.set(name, settled);
    void settled.then(() => {
      if (this.#last.get(name) === settled) this.#last.delete(name);
    });
    return result;
  }
}
