/** A growing list of whole numbers, for what is too long for objects. */
export class IntList {
  length = 0;
  private items = new Int32Array(4096);

  push(value: number): void {
    if (this.length === this.items.length) this.grow();
    this.items[this.length++] = value;
  }

  /** Makes room for so many more, and answers the array to write them to from `length` on; they count at once. */
  extend(count: number): Int32Array {
    while (this.length + count > this.items.length) this.grow();
    this.length += count;
    return this.items;
  }

  at(index: number): number {
    return this.items[index] ?? 0;
  }

  toArray(): Int32Array {
    return this.items.slice(0, this.length);
  }

  /** The array behind the list, for reading; it holds more than the list. */
  get array(): Int32Array {
    return this.items;
  }

  private grow(): void {
    const larger = new Int32Array(2 * this.items.length);
    larger.set(this.items);
    this.items = larger;
  }
}
