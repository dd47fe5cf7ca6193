/** Before so many entries have changed, keeping them apart is cheaper than copying the rest. */
const MOST_ABOVE = 4000

/** A large map that is never changed: a later one shares its entries, and holds apart what differs. */
export class LayeredMap<K, V> {
  readonly #below: ReadonlyMap<K, V>
  readonly #above: ReadonlyMap<K, V>

  constructor(below: ReadonlyMap<K, V>, above: ReadonlyMap<K, V> = new Map()) {
    this.#below = below
    this.#above = above
  }

  get(key: K): V | undefined {
    return this.#above.get(key) ?? this.#below.get(key)
  }

  with(entries: Iterable<readonly [K, V]>): LayeredMap<K, V> {
    const above = new Map(this.#above)
    for (const [key, value] of entries) above.set(key, value)
    return above.size > MOST_ABOVE ? new LayeredMap(new Map([...this.#below, ...above])) : new LayeredMap(this.#below, above)
  }
}
