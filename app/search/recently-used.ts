/** Keeps the entries used last; of more than `most` the one used longest ago is dropped. */
export class RecentlyUsed<Key, Value> {
  readonly #kept = new Map<Key, Value>();
  readonly #most: number;

  constructor(most: number) {
    this.#most = most;
  }

  get size(): number {
    return this.#kept.size;
  }

  has(key: Key): boolean {
    return this.#kept.has(key);
  }

  /** The entry, made where there is none, and from now on the one used last. */
  use(key: Key, make: () => Value): Value {
    const value = this.#kept.has(key) ? (this.#kept.get(key) as Value) : make();
    this.#kept.delete(key);
    this.#kept.set(key, value);
    if (this.#kept.size > this.#most) this.#kept.delete(this.#kept.keys().next().value as Key);
    return value;
  }
}
