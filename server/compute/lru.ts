/** A map that forgets what was not asked for longest. */
export class Lru<V> {
  readonly #entries = new Map<string, V>()

  /** @param size most entries kept, above 0 */
  constructor(readonly size: number) {}

  /** The value under a key, made when it is not kept. What throws is not kept. */
  get(key: string, make: () => V): V {
    const kept = this.#entries.get(key)
    const value = kept ?? make()
    this.#entries.delete(key)
    this.#entries.set(key, value)
    if (this.#entries.size > this.size) this.#entries.delete(this.#entries.keys().next().value!)
    return value
  }
}
