/** A binary heap of states by cost; equal costs leave in the order they came, so that the result is one. */
export class Heap {
  private states = new Int32Array(1024);
  private costs = new Float64Array(1024);
  private turns = new Int32Array(1024);
  private turn = 0;
  size = 0;

  clear(): void {
    this.size = 0;
    this.turn = 0;
  }

  push(state: number, cost: number): void {
    if (this.size === this.states.length) this.grow();
    const turn = this.turn++;
    let at = this.size++;
    while (at > 0) {
      const up = (at - 1) >> 1;
      if (this.costs[up]! <= cost) break;
      this.move(up, at);
      at = up;
    }
    this.set(at, state, cost, turn);
  }

  pop(): number {
    const top = this.states[0]!;
    const last = --this.size;
    const state = this.states[last]!;
    const cost = this.costs[last]!;
    const turn = this.turns[last]!;
    let at = 0;
    for (;;) {
      let child = 2 * at + 1;
      if (child >= last) break;
      if (child + 1 < last && this.before(child + 1, child)) child++;
      if (cost < this.costs[child]! || (cost === this.costs[child] && turn < this.turns[child]!)) break;
      this.move(child, at);
      at = child;
    }
    if (last > 0) this.set(at, state, cost, turn);
    return top;
  }

  private before(a: number, b: number): boolean {
    return this.costs[a]! < this.costs[b]! || (this.costs[a] === this.costs[b] && this.turns[a]! < this.turns[b]!);
  }

  private set(at: number, state: number, cost: number, turn: number): void {
    this.states[at] = state;
    this.costs[at] = cost;
    this.turns[at] = turn;
  }

  private move(from: number, to: number): void {
    this.set(to, this.states[from]!, this.costs[from]!, this.turns[from]!);
  }

  private grow(): void {
    const states = new Int32Array(2 * this.states.length);
    const costs = new Float64Array(2 * this.states.length);
    const turns = new Int32Array(2 * this.states.length);
    states.set(this.states);
    costs.set(this.costs);
    turns.set(this.turns);
    Object.assign(this, { states, costs, turns });
  }
}
